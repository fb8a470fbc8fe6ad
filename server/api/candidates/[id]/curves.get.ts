import { candidateCurves } from '../../../services/candidate-drawings'
import { validParam } from '../../../utils/validate'

/** GET /api/candidates/:id/curves: SER of one row over its SNR range. */
export default defineEventHandler(event => candidateCurves(validParam(event, 'id')))
