import { personChange } from '#shared/schemas/people'
import { changePerson } from '../../services/people'
import { callerOf } from '../../utils/caller'
import { validBody, validParam } from '../../utils/validate'

/** PATCH /api/people/:person: renames, disables (with a successor for studies left without an owner), gives a role or a new password. */
export default defineEventHandler(async (event) => {
  const id = validParam(event, 'person')
  return changePerson(id, await validBody(event, personChange), callerOf(event).account)
})
