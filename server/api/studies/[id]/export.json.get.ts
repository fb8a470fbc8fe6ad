import { Readable } from 'node:stream'
import { jsonOf } from '../../../exports/json'
import { sendFile } from '../../../exports/send'
import { gatherStudy } from '../../../services/study-exports'
import { callerOf, studyOf } from '../../../utils/caller'

/** GET /api/studies/:id/export.json: the study with all its rows as JSON, streamed. */
export default defineEventHandler(async (event) => {
  const data = await gatherStudy(studyOf(event).id, callerOf(event).account.name)
  return sendFile(event, { study: data.study.name, at: data.at, extension: 'json', type: 'application/json' }, () => Readable.from(jsonOf(data)))
})
