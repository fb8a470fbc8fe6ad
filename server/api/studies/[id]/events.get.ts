import { eventsQuery } from '#shared/schemas/events'
import { callerOf, studyOf } from '../../../utils/caller'
import { streamEvents } from '../../../utils/event-stream'
import { validQuery } from '../../../utils/validate'

/** GET /api/studies/:id/events: what changes in the study, as server-sent events; Last-Event-ID, or `after`, brings what was missed. */
export default defineEventHandler(event => streamEvents(event, studyOf(event).id, callerOf(event), validQuery(event, eventsQuery).after))
