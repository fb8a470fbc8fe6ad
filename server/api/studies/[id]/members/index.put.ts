import { memberChange } from '#shared/schemas/members'
import { putMember } from '../../../../services/members'
import { callerOf, studyOf } from '../../../../utils/caller'
import { validBody } from '../../../../utils/validate'

/** PUT /api/studies/:id/members: adds a person or changes their role. */
export default defineEventHandler(async event => putMember(studyOf(event).id, await validBody(event, memberChange), callerOf(event).account))
