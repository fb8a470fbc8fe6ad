import type { IncomingMessage } from 'node:http'
import type { H3Event } from 'h3'
import { getQuery, getRouterParam, readRawBody } from 'h3'
import { z } from 'zod'
import { issuesOf } from '../errors/issues'
import { fromJson } from './json'
import { problem } from './problem'

/** Most bytes of a body, where a route does not set less. */
export const mostBytes = 8 * 1024 * 1024

/** Refuses a body by what is wrong in it. */
function parsed<T extends z.ZodType>(schema: T, value: unknown): z.infer<T> {
  const result = schema.safeParse(value)
  if (result.success) return result.data
  const errors = issuesOf(result.error)
  problem(422, errors.length === 1 ? errors[0]!.message : `${errors.length} inputs are not allowed.`, { errors })
}

/**
 * The request's JSON body, checked.
 * @param schema of the body, or what chooses it by the body
 * @param limit most bytes
 * @throws 400 when it is no JSON, 413 when it is too large, 415 when it does not say that it is JSON, 422 with every mistake's path
 */
export async function validBody<T extends z.ZodType>(event: H3Event, schema: T | ((body: unknown) => T), limit = mostBytes): Promise<z.infer<T>> {
  const { headers } = event.node.req
  const type = headers['content-type']
  if (type && !/^application\/(?:[\w.-]+\+)?json\b/i.test(type)) problem(415, 'Send the body as application/json.')
  const tooLarge = () => problem(413, `A body has at most ${limit < 1024 * 1024 ? `${limit / 1024} kB` : `${limit / 1024 / 1024} MB`}.`)
  if (Number(headers['content-length'] ?? 0) > limit) tooLarge()
  const raw = headers['content-length'] === undefined && headers['transfer-encoding']
    ? await readChunks(event.node.req, limit) ?? tooLarge()
    : await readRawBody(event, false) ?? Buffer.alloc(0)
  const body = fromJson(textOf(raw))
  return parsed(typeof schema === 'function' ? schema(body) : schema, body)
}

/** A body's text; bytes that are none would otherwise be stored as replacement characters. */
function textOf(raw: Buffer): string {
  try {
    return new TextDecoder('utf-8', { fatal: true }).decode(raw)
  } catch {
    return problem(400, 'The body is not in UTF-8.')
  }
}

/** A body of unstated length; undefined when it is too long. */
async function readChunks(request: IncomingMessage, limit: number): Promise<Buffer | undefined> {
  const chunks: Buffer[] = []
  let length = 0
  for await (const chunk of request.iterator({ destroyOnReturn: false }) as AsyncIterable<Buffer>) {
    chunks.push(chunk)
    length += chunk.length
    if (length > limit) break
  }
  if (length <= limit) return Buffer.concat(chunks)
  // Left unread, the rest would block the connection, which still has to carry the answer.
  request.resume()
  return undefined
}

/**
 * The request's query, checked. A name that is given twice is an array to the schema.
 * @throws 422 with every mistake's path
 */
export const validQuery = <T extends z.ZodType>(event: H3Event, schema: T): z.infer<T> => parsed(schema, getQuery(event))

/**
 * An identifier in the request's path.
 * @param name of the parameter
 * @throws 422 when it is no UUID
 */
export const validParam = (event: H3Event, name: string): string =>
  parsed(z.object({ [name]: z.uuid({ error: 'An identifier is a UUID.' }) }), { [name]: getRouterParam(event, name) })[name]!
