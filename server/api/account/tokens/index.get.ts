import { listTokens } from '../../../services/tokens'
import { callerOf } from '../../../utils/caller'

/** GET /api/account/tokens: the caller's API tokens, without their text. */
export default defineEventHandler(async event => ({ items: await listTokens(callerOf(event).account), next: null }))
