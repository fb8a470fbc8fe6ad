import { cancelSweep } from '../../services/sweeps'
import { callerOf, studyOf } from '../../utils/caller'
import { validParam } from '../../utils/validate'

/** DELETE /api/sweeps/:id: cancels a sweep; rows without numbers are removed, the others stay, and the answer counts both. */
export default defineEventHandler(event => cancelSweep(studyOf(event).id, validParam(event, 'id'), callerOf(event).account))
