import { listMembers } from '../../../../services/members'
import { studyOf } from '../../../../utils/caller'

/** GET /api/studies/:id/members: the people of a study. */
export default defineEventHandler(async event => ({ items: await listMembers(studyOf(event).id), next: null }))
