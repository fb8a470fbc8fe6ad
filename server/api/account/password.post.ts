import { passwordChange } from '#shared/schemas/session'
import { changePassword } from '../../services/accounts'
import { callerAddress } from '../../utils/address'
import { callerOf } from '../../utils/caller'
import { validBody } from '../../utils/validate'

/** POST /api/account/password: changes the caller's password and ends their other sessions; API tokens when that is asked for. */
export default defineEventHandler(async (event) => {
  await changePassword(callerOf(event), await validBody(event, passwordChange), callerAddress(event))
  return sendNoContent(event)
})
