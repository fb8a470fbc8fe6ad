import { getCandidate } from '../../../services/candidates'
import { validParam } from '../../../utils/validate'
import { setVersion } from '../../../utils/version'

/** GET /api/candidates/:id: one row. */
export default defineEventHandler(async (event) => {
  const candidate = await getCandidate(validParam(event, 'id'))
  setVersion(event, candidate.version)
  return candidate
})
