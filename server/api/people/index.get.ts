import { peopleQuery } from '#shared/schemas/people'
import { listPeople } from '../../services/people'
import { validQuery } from '../../utils/validate'

/** GET /api/people: all accounts. */
export default defineEventHandler(event => listPeople(validQuery(event, peopleQuery)))
