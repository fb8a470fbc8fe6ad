import { evaluation } from '#shared/schemas/evaluate'
import { evaluateRequest } from '../services/evaluation'
import { goneSignal } from '../utils/gone'
import { validBody } from '../utils/validate'

/** POST /api/evaluate: computes a constellation without saving anything; it stops when the caller goes away. */
export default defineEventHandler(async (event) => {
  const request = await validBody(event, evaluation)
  return evaluateRequest(request, goneSignal(event))
})
