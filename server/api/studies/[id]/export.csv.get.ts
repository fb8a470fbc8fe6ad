import { Readable } from 'node:stream'
import { csvOf } from '../../../exports/csv'
import { sendFile } from '../../../exports/send'
import { gatherStudy } from '../../../services/study-exports'
import { callerOf, studyOf } from '../../../utils/caller'

/** GET /api/studies/:id/export.csv: the grid as CSV, full numbers, streamed. */
export default defineEventHandler(async (event) => {
  const data = await gatherStudy(studyOf(event).id, callerOf(event).account.name)
  return sendFile(event, { study: data.study.name, at: data.at, extension: 'csv', type: 'text/csv; charset=utf-8' }, () => Readable.from(csvOf(data)))
})
