import { curvesQuery } from '#shared/schemas/values'
import { candidateCurves } from '../../../services/candidate-drawings'
import { goneSignal } from '../../../utils/gone'
import { validParam, validQuery } from '../../../utils/validate'

/** GET /api/candidates/:id/curves: SER, BER or information rates of one row over its SNR range. */
export default defineEventHandler(event => candidateCurves(validParam(event, 'id'), validQuery(event, curvesQuery).quantity, goneSignal(event)))
