import { endSession, sessionAccount } from '../services/sessions'
import { overHttps } from '../utils/base-url'

/** Ties the package's sealed cookies to our session rows: without its row a cookie is worth nothing, and signing out ends the row. */
export default defineNitroPlugin(() => {
  // The package reads its configuration at the first request, from these names among others.
  process.env.NUXT_SESSION_COOKIE_SECURE = String(overHttps())

  sessionHooks.hook('clear', async ({ secure }) => {
    if (secure?.sessionId) await endSession(secure.sessionId)
  })
  sessionHooks.hook('fetch', async (session) => {
    const account = session.secure?.sessionId ? await sessionAccount(session.secure.sessionId) : null
    if (account) session.user = account
    else delete session.user
  })
})
