import { studiesQuery } from '#shared/schemas/studies'
import { listStudies } from '../../services/study-list'
import { callerOf } from '../../utils/caller'
import { validQuery } from '../../utils/validate'

/** GET /api/studies: the caller's studies, each with its people and its leading candidate. */
export default defineEventHandler(event => listStudies(callerOf(event).account, validQuery(event, studiesQuery)))
