import { revokeToken } from '../../../services/tokens'
import { callerOf } from '../../../utils/caller'
import { validParam } from '../../../utils/validate'

/** DELETE /api/account/tokens/:token: revokes one of the caller's tokens at once. */
export default defineEventHandler(async (event) => {
  await revokeToken(callerOf(event).account, validParam(event, 'token'))
  return sendNoContent(event)
})
