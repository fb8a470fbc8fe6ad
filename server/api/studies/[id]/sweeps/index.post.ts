import { sweepCreation } from '#shared/schemas/sweeps'
import { createSweep } from '../../../../services/sweeps'
import { callerOf, studyOf } from '../../../../utils/caller'
import { validBody } from '../../../../utils/validate'

/** POST /api/studies/:id/sweeps: starts a sweep; its rows and its progress follow as events. */
export default defineEventHandler(async (event) => {
  const definition = await validBody(event, sweepCreation)
  const sweep = await createSweep(studyOf(event).id, definition, callerOf(event).account)
  setResponseStatus(event, 202)
  return sweep
})
