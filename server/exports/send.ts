import type { H3Event } from 'h3'
import { send, sendStream, setHeader } from 'h3'
import type { Readable } from 'node:stream'

/** A study's name as the name of a file on any system. */
const fileName = (name: string) => name.normalize('NFKD').replace(/[^\w.-]+/g, '-').replace(/^[-.]+|[-.]+$/g, '').slice(0, 80) || 'study'

export interface ExportFile {
  /** the study's name */
  study: string
  at: Date
  extension: string
  /** media type */
  type: string
}

/**
 * Answers with a file that the browser saves under the study's name and the day.
 * @param write begins the file; not called where only the headers are asked for
 */
export function sendFile(event: H3Event, { study, at, extension, type }: ExportFile, write: () => Readable): Promise<void> {
  setHeader(event, 'content-type', type)
  setHeader(event, 'content-disposition', `attachment; filename="${fileName(study)}-${at.toISOString().slice(0, 10)}.${extension}"`)
  return event.context.head ? send(event, '') : sendStream(event, write())
}
