import { Readable } from 'node:stream'
import { jsonOf } from '../../../exports/json'
import { announceFile } from '../../../exports/send'
import { gatherStudy } from '../../../services/study-exports'
import { callerOf, studyOf } from '../../../utils/caller'

/** GET /api/studies/:id/export.json: the study with all its rows as JSON, streamed. */
export default defineEventHandler(async (event) => {
  const data = await gatherStudy(studyOf(event).id, callerOf(event).account.name)
  announceFile(event, data.study.name, data.at, 'json', 'application/json')
  return sendStream(event, Readable.from(jsonOf(data)))
})
