import { removeMember } from '../../../../services/members'
import { callerOf, studyOf } from '../../../../utils/caller'
import { validParam } from '../../../../utils/validate'

/** DELETE /api/studies/:id/members/:user: removes a person from a study. */
export default defineEventHandler(async (event) => {
  await removeMember(studyOf(event).id, validParam(event, 'user'), callerOf(event).account)
  return sendNoContent(event)
})
