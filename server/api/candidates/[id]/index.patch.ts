import { candidateChange } from '#shared/schemas/candidates'
import { changeCandidate } from '../../../services/candidates'
import { callerOf, studyOf } from '../../../utils/caller'
import { validBody, validParam } from '../../../utils/validate'
import { ifMatch, setVersion } from '../../../utils/version'

/** PATCH /api/candidates/:id: changes a row's inputs; its computed cells follow as an event. */
export default defineEventHandler(async (event) => {
  const version = ifMatch(event)
  const change = await validBody(event, candidateChange)
  const candidate = await changeCandidate(studyOf(event).id, validParam(event, 'id'), change, version, callerOf(event).account)
  setVersion(event, candidate.version)
  return candidate
})
