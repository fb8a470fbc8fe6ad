import { callerOf } from '../../utils/caller'

/** GET /api/session: who is signed in. */
export default defineEventHandler(event => callerOf(event).account)
