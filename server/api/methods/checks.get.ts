import { checkValues } from '../../services/methods'

/** GET /api/methods/checks: what this build computes for each published value. */
export default defineEventHandler(() => checkValues())
