import { decide } from '../access/decide'
import { matchRoute } from '../access/match'
import { sessionAccount } from '../services/sessions'
import { tokenCaller } from '../services/tokens'
import type { Caller } from '../utils/caller'
import { sessionIdOf } from '../utils/session-cookie'

/** Who calls, by API token or by session; null: nobody whom we know. */
async function identify(event: Parameters<typeof sessionIdOf>[0]): Promise<Caller | null> {
  const { authorization } = event.node.req.headers
  if (authorization !== undefined) {
    const [, token] = /^Bearer +(\S+)$/i.exec(authorization) ?? []
    return token ? tokenCaller(token) : null
  }
  const sessionId = await sessionIdOf(event)
  const account = sessionId === null ? null : await sessionAccount(sessionId)
  return account && { account, scope: 'session', sessionId, tokenId: null }
}

/** The one place that lets requests to the API through, by the table of rules: what is not in it exists for nobody. */
export default defineEventHandler(async (event) => {
  const path = event.path.split('?')[0]!
  if (path !== '/api' && !path.startsWith('/api/')) return
  const match = matchRoute(event.method, path)
  if (!match) problem(404, 'The API has nothing at this address.')
  if ('allow' in match) problem(405, `This address answers ${match.allow.join(', ')} only.`, { headers: { allow: match.allow.join(', ') } })
  const caller = match.rule === 'anyone' ? null : await identify(event)
  const study = await decide(match, caller)
  if (caller) event.context.caller = caller
  if (study) event.context.study = study
})
