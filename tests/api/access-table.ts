import type { Route } from '../../server/access/rules'

/** Callers of the walk: the four roles of a study, an administrator and a member without a part in it, and nobody. */
export const callers = ['owner', 'editor', 'reviewer', 'observer', 'admin', 'outsider', 'anonymous'] as const
export type CallerName = (typeof callers)[number]

/** Answers of one route, in the order of `callers`: `ok` is let through (whatever then becomes of the body), a number is the refusal. */
type Answers = readonly ('ok' | 401 | 403 | 404)[]

const everybody: Answers = ['ok', 'ok', 'ok', 'ok', 'ok', 'ok', 'ok']
const signedIn: Answers = ['ok', 'ok', 'ok', 'ok', 'ok', 'ok', 401]
const admin: Answers = [403, 403, 403, 403, 'ok', 403, 401]
const reads: Answers = ['ok', 'ok', 'ok', 'ok', 'ok', 404, 401]
const edits: Answers = ['ok', 'ok', 403, 403, 403, 404, 401]
const owns: Answers = ['ok', 403, 403, 403, 403, 404, 401]

/** Every route of the API and who may have it, written out apart from the rules that it checks. */
export const expected: Record<Route, Answers> = {
  'GET /api/health': everybody,
  'GET /api/openapi.json': everybody,
  'POST /api/session': everybody,
  'GET /api/session': signedIn,
  'DELETE /api/session': signedIn,
  'GET /api/_auth/session': everybody,
  'DELETE /api/_auth/session': everybody,
  'POST /api/account/password': signedIn,
  'GET /api/account/tokens': signedIn,
  'POST /api/account/tokens': signedIn,
  'DELETE /api/account/tokens/:token': signedIn,
  'GET /api/people': admin,
  'POST /api/people': admin,
  'PATCH /api/people/:person': admin,
  'GET /api/studies': signedIn,
  'POST /api/studies': signedIn,
  'GET /api/studies/:id': reads,
  'PATCH /api/studies/:id': edits,
  'DELETE /api/studies/:id': owns,
  'POST /api/studies/:id/restore': owns,
  'GET /api/studies/:id/members': reads,
  'PUT /api/studies/:id/members': owns,
  'DELETE /api/studies/:id/members/:user': owns,
  'GET /api/studies/:id/activity': reads,
  'GET /api/studies/:id/events': reads,
  'GET /api/studies/:id/candidates': reads,
  'POST /api/studies/:id/candidates': edits,
  'POST /api/studies/:id/candidates/delete': edits,
  'POST /api/studies/:id/candidates/restore': edits,
  'POST /api/studies/:id/candidates/duplicate': edits,
  'POST /api/studies/:id/candidates/move': edits,
  'POST /api/studies/:id/parts': reads,
  'PUT /api/studies/:id/pins': edits,
  'GET /api/candidates/:id': reads,
  'PATCH /api/candidates/:id': edits,
  'DELETE /api/candidates/:id': edits,
  'GET /api/candidates/:id/curves': reads,
  'GET /api/candidates/:id/constellation': reads,
  'GET /api/studies/:id/sweeps': reads,
  'POST /api/studies/:id/sweeps': edits,
  'DELETE /api/sweeps/:id': edits,
  'POST /api/candidates/:id/searches': edits,
  'GET /api/studies/:id/searches': reads,
  'DELETE /api/searches/:id': edits,
  'POST /api/searches/:id/resume': edits,
  'GET /api/studies/:id/export.xlsx': reads,
  'GET /api/studies/:id/export.csv': reads,
  'GET /api/studies/:id/export.json': reads,
  'POST /api/evaluate': signedIn,
  'GET /api/methods': signedIn,
  'GET /api/methods/checks': signedIn,
}

/** What the framework answers beside the API and the pages' shell: its error page, and server-rendered islands, of which there are none. */
export const outsideTheApi = ['ANY /__nuxt_error', 'ANY /__nuxt_island/**']
