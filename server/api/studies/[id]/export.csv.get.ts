import { Readable } from 'node:stream'
import { csvOf } from '../../../exports/csv'
import { announceFile } from '../../../exports/send'
import { gatherStudy } from '../../../services/study-exports'
import { callerOf, studyOf } from '../../../utils/caller'

/** GET /api/studies/:id/export.csv: the grid as CSV, full numbers, streamed. */
export default defineEventHandler(async (event) => {
  const data = await gatherStudy(studyOf(event).id, callerOf(event).account.name)
  announceFile(event, data.study.name, data.at, 'csv', 'text/csv; charset=utf-8')
  return sendStream(event, Readable.from(csvOf(data)))
})
