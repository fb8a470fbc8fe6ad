import { signIn } from '#shared/schemas/session'
import { createSession, endSession } from '../../services/sessions'
import { checkPassword } from '../../services/sign-in'
import { callerAddress } from '../../utils/address'
import { sessionIdOf, setSessionCookie } from '../../utils/session-cookie'
import { validBody } from '../../utils/validate'

/** Most bytes of a sign-in. */
const limit = 16 * 1024

/** POST /api/session: signs in; the session that the browser had before ends. */
export default defineEventHandler(async (event) => {
  const account = await checkPassword(await validBody(event, signIn, limit), callerAddress(event))
  const before = await sessionIdOf(event)
  if (before !== null) await endSession(before)
  await setSessionCookie(event, account, await createSession(account.id, event.node.req.headers['user-agent'] ?? ''))
  return account
})
