import type { H3Event } from 'h3'
import type { Account } from '#shared/schemas/session'
import type { StudyRole } from '#shared/schemas/members'

/** Who calls, and by what: a browser's session, or an API token that may read or also write. */
export interface Caller {
  account: Account
  scope: 'session' | 'read' | 'write'
  /** the session's row; null for a token */
  sessionId: string | null
  /** the token's row; null for a session */
  tokenId: string | null
}

/** The study that a request is about, and the caller's role in it; null: an administrator who only reads. */
export interface StudyAccess {
  id: string
  role: StudyRole | null
}

declare module 'h3' {
  interface H3EventContext {
    caller?: Caller
    study?: StudyAccess
    /** whether only the headers are asked for, by HEAD */
    head?: true
    /** of the page's content security policy */
    nonce?: string
  }
}

/** Who calls; on routes whose rule asks for somebody signed in. */
export function callerOf(event: H3Event): Caller {
  if (!event.context.caller) throw new Error(`${event.method} ${event.path} asks who calls, and its rule does not.`)
  return event.context.caller
}

/** The study of the request; on routes whose rule names roles in a study. */
export function studyOf(event: H3Event): StudyAccess {
  if (!event.context.study) throw new Error(`${event.method} ${event.path} asks for its study, and its rule has none.`)
  return event.context.study
}
