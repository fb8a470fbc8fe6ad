import { PassThrough } from 'node:stream'
import { sendFile } from '../../../exports/send'
import { writeWorkbook } from '../../../exports/workbook/workbook'
import { gatherStudy } from '../../../services/study-exports'
import { callerOf, studyOf } from '../../../utils/caller'

/** GET /api/studies/:id/export.xlsx: the trade study as a workbook, streamed. */
export default defineEventHandler(async (event) => {
  const data = await gatherStudy(studyOf(event).id, callerOf(event).account.name)
  const type = 'application/vnd.openxmlformats-officedocument.spreadsheetml.sheet'
  return sendFile(event, { study: data.study.name, at: data.at, extension: 'xlsx', type }, () => {
    const stream = new PassThrough()
    // A failure in the middle breaks the stream, so that half a workbook is never taken for a whole one.
    writeWorkbook(data, stream).catch((error: Error) => stream.destroy(error))
    return stream
  })
})
