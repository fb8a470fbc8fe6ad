import { apiDescription } from '../api-description/document'

let description: ReturnType<typeof apiDescription> | undefined

/** GET /api/openapi.json: the API's description. */
export default defineEventHandler(() => description ??= apiDescription())
