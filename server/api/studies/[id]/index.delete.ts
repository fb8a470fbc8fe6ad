import { deleteStudy } from '../../../services/study-removal'
import { callerOf, studyOf } from '../../../utils/caller'
import { ifMatch } from '../../../utils/version'

/** DELETE /api/studies/:id: deletes a study; an owner can restore it for 30 days. */
export default defineEventHandler(async (event) => {
  await deleteStudy(studyOf(event), ifMatch(event), callerOf(event).account)
  return sendNoContent(event)
})
