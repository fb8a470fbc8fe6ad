import { eventsQuery } from '#shared/schemas/events'
import { callerOf, studyOf } from '../../../utils/caller'
import { eventStreamType, streamEvents } from '../../../utils/event-stream'
import { validQuery } from '../../../utils/validate'

/** GET /api/studies/:id/events: what changes in the study, as server-sent events; Last-Event-ID, or `after`, brings what was missed. */
export default defineEventHandler((event) => {
  const { after } = validQuery(event, eventsQuery)
  if (!event.context.head) return streamEvents(event, studyOf(event).id, callerOf(event), after)
  setResponseHeader(event, 'content-type', eventStreamType)
  return ''
})
