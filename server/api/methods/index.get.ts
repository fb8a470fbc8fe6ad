import { methodsPage } from '../../services/methods'

/** GET /api/methods: methods, their formulas set, their sources and published values. */
export default defineEventHandler(() => methodsPage())
