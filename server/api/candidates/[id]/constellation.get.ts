import { candidateConstellation } from '../../../services/candidate-drawings'
import { goneSignal } from '../../../utils/gone'
import { validParam } from '../../../utils/validate'

/** GET /api/candidates/:id/constellation: points, decision cells and neighbours of one row at unit mean energy. */
export default defineEventHandler(event => candidateConstellation(validParam(event, 'id'), goneSignal(event)))
