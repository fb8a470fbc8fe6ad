import { callerOf, studyOf } from '../../../utils/caller'
import { streamEvents } from '../../../utils/event-stream'

/** GET /api/studies/:id/events: what changes in the study, as server-sent events; Last-Event-ID brings what was missed. */
export default defineEventHandler(event => streamEvents(event, studyOf(event).id, callerOf(event)))
