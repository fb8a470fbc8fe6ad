import type { H3Event } from 'h3'
import { setHeader } from 'h3'

/** A study's name as the name of a file on any system. */
const fileName = (name: string) => name.normalize('NFKD').replace(/[^\w.-]+/g, '-').replace(/^[-.]+|[-.]+$/g, '').slice(0, 80) || 'study'

/** Headers of a file that the browser saves under the study's name and the day. */
export function announceFile(event: H3Event, study: string, at: Date, extension: string, type: string) {
  setHeader(event, 'content-type', type)
  setHeader(event, 'content-disposition', `attachment; filename="${fileName(study)}-${at.toISOString().slice(0, 10)}.${extension}"`)
}
