import type { H3Event } from 'h3'
import { getCookie } from 'h3'
import type { Account } from '#shared/schemas/session'

/** The cookie's name in the runtime configuration. */
const cookieName = () => useRuntimeConfig().session.name ?? ''

/** Id of the session's row that the request's cookie names; null without one. */
export async function sessionIdOf(event: H3Event): Promise<string | null> {
  // Without this the package would hand every caller a cookie.
  if (!getCookie(event, cookieName())) return null
  const { secure } = await getUserSession(event)
  return secure?.sessionId ?? null
}

/** Seals a session into a new cookie; nothing of the request's own cookie goes into it. */
export async function setSessionCookie(event: H3Event, account: Account, sessionId: string): Promise<void> {
  event.context.sessions = { ...event.context.sessions, [cookieName()]: { id: crypto.randomUUID(), createdAt: Date.now(), data: {} } }
  await setUserSession(event, { user: account, secure: { sessionId } })
}

/** Takes the cookie away. */
export async function clearSessionCookie(event: H3Event): Promise<void> {
  await clearUserSession(event)
}
