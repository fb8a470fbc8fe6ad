import { tokenCreation } from '#shared/schemas/session'
import { createToken } from '../../../services/tokens'
import { callerOf } from '../../../utils/caller'
import { validBody } from '../../../utils/validate'

/** POST /api/account/tokens: makes an API token, whose text this answer shows once. */
export default defineEventHandler(async (event) => {
  const token = await createToken(callerOf(event).account, await validBody(event, tokenCreation))
  setResponseStatus(event, 201)
  return token
})
