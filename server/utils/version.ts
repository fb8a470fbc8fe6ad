import type { H3Event } from 'h3'
import { getRequestHeader, setResponseHeader } from 'h3'
import { problem } from './problem'

/**
 * The version that a change is based on.
 * @throws 428 when If-Match is missing, 400 when it names no version
 */
export function ifMatch(event: H3Event): number {
  const header = getRequestHeader(event, 'if-match')
  if (header === undefined) problem(428, 'Name the version that this change is based on by If-Match.')
  const [, version] = /^\s*(?:W\/)?"?(\d{1,9})"?\s*$/.exec(header) ?? []
  return version ? Number(version) : problem(400, 'If-Match carries one version, as in "3".')
}

/** States the version of what is answered, for the next change's If-Match. */
export function setVersion(event: H3Event, version: number): void {
  setResponseHeader(event, 'etag', `"${version}"`)
}
