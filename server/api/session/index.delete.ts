import { clearSessionCookie } from '../../utils/session-cookie'

/** DELETE /api/session: signs out; the session ends for whoever holds its cookie. */
export default defineEventHandler(async (event) => {
  await clearSessionCookie(event)
  return sendNoContent(event)
})
