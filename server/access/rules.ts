import type { StudyRole } from '#shared/schemas/members'

/** How a route finds the study that it belongs to. */
export type Subject = 'study' | 'candidate' | 'sweep' | 'search'

/**
 * Who may call a route: anyone, any signed-in account, one signed in with its password and not by an API token, administrators,
 * or people with one of the named roles in the study that the route's `id` belongs to.
 */
export type Rule
  = | 'anyone'
    | 'signedIn'
    | 'session'
    | 'admin'
    | {
      roles: readonly StudyRole[]
      of: Subject
      /** whether administrators may who have no part in the study */
      admin: boolean
      /** whether it is also for deleted studies, which otherwise exist for nobody */
      deleted?: true
      /** whether it changes what an archived study keeps as it is */
      changes?: true
    }

const reads = (of: Subject): Rule => ({ roles: ['owner', 'editor', 'reviewer', 'observer'], of, admin: true })
const edits = (of: Subject): Rule => ({ roles: ['owner', 'editor'], of, admin: false, changes: true })
const owns = (of: Subject): Rule => ({ roles: ['owner'], of, admin: false })

/** Every route of the API. One that is not listed is refused for everybody. */
export const rules = {
  'GET /api/health': 'anyone',
  'GET /api/openapi.json': 'anyone',
  'POST /api/session': 'anyone',
  'GET /api/session': 'signedIn',
  'DELETE /api/session': 'session',
  // These two come with nuxt-auth-utils: the pages read the session through them.
  'GET /api/_auth/session': 'anyone',
  'DELETE /api/_auth/session': 'anyone',

  'POST /api/account/password': 'session',
  'GET /api/account/tokens': 'signedIn',
  'POST /api/account/tokens': 'session',
  'DELETE /api/account/tokens/:token': 'signedIn',

  'GET /api/people': 'admin',
  'POST /api/people': 'admin',
  'PATCH /api/people/:person': 'admin',

  'GET /api/studies': 'signedIn',
  'POST /api/studies': 'signedIn',
  'GET /api/studies/:id': reads('study'),
  // The one change that an archived study allows is to take it out of the archive: the service tells it from others.
  'PATCH /api/studies/:id': { roles: ['owner', 'editor'], of: 'study', admin: false },
  'DELETE /api/studies/:id': owns('study'),
  'POST /api/studies/:id/restore': { roles: ['owner'], of: 'study', admin: false, deleted: true },
  'GET /api/studies/:id/members': reads('study'),
  'PUT /api/studies/:id/members': owns('study'),
  'DELETE /api/studies/:id/members/:user': owns('study'),
  'GET /api/studies/:id/activity': reads('study'),
  'GET /api/studies/:id/events': reads('study'),

  'GET /api/studies/:id/candidates': reads('study'),
  'POST /api/studies/:id/candidates': edits('study'),
  'POST /api/studies/:id/candidates/delete': edits('study'),
  'POST /api/studies/:id/candidates/restore': edits('study'),
  'POST /api/studies/:id/candidates/duplicate': edits('study'),
  'POST /api/studies/:id/candidates/move': edits('study'),
  // Whoever reads a column has it computed: nothing of the study changes.
  'POST /api/studies/:id/parts': reads('study'),
  'PUT /api/studies/:id/pins': edits('study'),
  'GET /api/candidates/:id': reads('candidate'),
  'PATCH /api/candidates/:id': edits('candidate'),
  'DELETE /api/candidates/:id': edits('candidate'),
  'GET /api/candidates/:id/curves': reads('candidate'),
  'GET /api/candidates/:id/constellation': reads('candidate'),

  'GET /api/studies/:id/sweeps': reads('study'),
  'POST /api/studies/:id/sweeps': edits('study'),
  'DELETE /api/sweeps/:id': edits('sweep'),

  'POST /api/candidates/:id/searches': edits('candidate'),
  'GET /api/studies/:id/searches': reads('study'),
  'DELETE /api/searches/:id': edits('search'),
  'POST /api/searches/:id/resume': edits('search'),

  'GET /api/studies/:id/export.xlsx': reads('study'),
  'GET /api/studies/:id/export.csv': reads('study'),
  'GET /api/studies/:id/export.json': reads('study'),

  'POST /api/evaluate': 'signedIn',

  'GET /api/methods': 'signedIn',
  'GET /api/methods/checks': 'signedIn',
} satisfies Record<string, Rule>

/** Key of a route: its method and its path. */
export type Route = keyof typeof rules
