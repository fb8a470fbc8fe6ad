import type { Account } from '../schemas/session'

/** What the sealed session cookie holds: who, for pages to show, and the session's row, which alone decides. */
declare module '#auth-utils' {
  interface User extends Account {
    id: string
  }
  interface SecureSessionData {
    sessionId: string
  }
}

export {}
