import { PassThrough } from 'node:stream'
import { announceFile } from '../../../exports/send'
import { writeWorkbook } from '../../../exports/workbook/workbook'
import { gatherStudy } from '../../../services/study-exports'
import { callerOf, studyOf } from '../../../utils/caller'

/** GET /api/studies/:id/export.xlsx: the trade study as a workbook, streamed. */
export default defineEventHandler(async (event) => {
  const data = await gatherStudy(studyOf(event).id, callerOf(event).account.name)
  const stream = new PassThrough()
  announceFile(event, data.study.name, data.at, 'xlsx', 'application/vnd.openxmlformats-officedocument.spreadsheetml.sheet')
  // A failure in the middle breaks the stream, so that half a workbook is never taken for a whole one.
  writeWorkbook(data, stream).catch((error: Error) => stream.destroy(error))
  return sendStream(event, stream)
})
