import { personCreation } from '#shared/schemas/people'
import { createPerson } from '../../services/people'
import { callerOf } from '../../utils/caller'
import { validBody } from '../../utils/validate'

/** POST /api/people: creates an account. */
export default defineEventHandler(async (event) => {
  const person = await createPerson(await validBody(event, personCreation), callerOf(event).account)
  setResponseStatus(event, 201)
  return person
})
