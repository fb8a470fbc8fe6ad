import { isIP } from 'node:net'
import type { H3Event } from 'h3'
import { baseUrl } from './base-url'

const isLoopback = (address: string) => /^(?:::1|(?:::ffff:)?127\.\d+\.\d+\.\d+|localhost)$/.test(address)

/**
 * The caller's address. A proxy on this machine, in front of a server that people reach under another name, is believed
 * about it; anybody else could write anything into the header.
 */
export function callerAddress(event: H3Event): string {
  const remote = event.node.req.socket.remoteAddress ?? 'unknown'
  const host = baseUrl()?.hostname
  if (!isLoopback(remote) || !host || isLoopback(host)) return remote
  const header = event.node.req.headers['x-forwarded-for']
  const last = String(header ?? '').split(',').at(-1)!.trim()
  return isIP(last) ? last : remote
}
