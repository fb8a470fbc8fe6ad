import type { StudyRole } from '#shared/schemas/members'
import { archivedSentence, studyStanding } from '../services/study-access'
import type { Caller, StudyAccess } from '../utils/caller'
import { problem } from '../utils/problem'
import type { Match } from './match'
import type { Rule } from './rules'

const list = new Intl.ListFormat('en-GB', { type: 'conjunction' })
const plural: Record<StudyRole, string> = { owner: 'owners', editor: 'editors', reviewer: 'reviewers', observer: 'observers' }

/** Calls of a token that may only read: reading, and computing without saving. */
const readsOnly = (route: string) => route.startsWith('GET ') || route === 'POST /api/evaluate' || route === 'POST /api/studies/:id/parts'

/**
 * Decides whether a caller may have a route.
 * @param caller null: anonymous
 * @returns the study that the route is about, null on routes that are about none
 * @throws 401 to anonymous callers, 403 with why, 404 for studies that the caller has no part in, 409 for changes of archived ones
 */
export async function decide({ route, rule, params }: Match, caller: Caller | null): Promise<StudyAccess | null> {
  if (rule === 'anyone') return null
  if (!caller) problem(401, 'Sign in to use this.')
  if (caller.scope === 'read' && !readsOnly(route)) problem(403, 'This API token may only read.')
  if (rule === 'session' && caller.scope !== 'session') problem(403, 'Sign in with your password for this; an API token is not enough.')
  if (rule === 'admin' && caller.account.role !== 'admin') problem(403, 'Only administrators may do this.')
  return typeof rule === 'string' ? null : decideInStudy(rule, params.id ?? '', caller)
}

async function decideInStudy(rule: Exclude<Rule, string>, id: string, { account }: Caller): Promise<StudyAccess> {
  const study = await studyStanding(rule.of, id, account.id)
  const gone = study?.deleted && !rule.deleted
  const partless = study?.role === null && account.role !== 'admin'
  if (!study || gone || partless) {
    problem(404, rule.of === 'study' ? 'This study does not exist, or is not shared with you.' : 'This does not exist, or is not shared with you.')
  }
  if (study.role && rule.roles.includes(study.role)) {
    if (rule.changes && study.archived) problem(409, archivedSentence)
    return { id: study.id, role: study.role }
  }
  const mayRead = rule.admin && account.role === 'admin'
  if (mayRead) return { id: study.id, role: study.role }
  const who = list.format(rule.roles.map(role => plural[role]))
  const you = study.role ? `your role in it is ${study.role}` : 'an administrator may only read it'
  problem(403, `Only ${who} of the study may do this; ${you}.`)
}
