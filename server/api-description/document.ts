import { STATUS_CODES } from 'node:http'
import { z } from 'zod'
import { version } from '../../package.json'
import { rules } from '../access/rules'
import type { Route, Rule } from '../access/rules'
import { describeSchemas } from './json-schemas'
import type { DescribedSchemas, JsonSchema } from './json-schemas'
import { operations } from './operations'
import type { Operation } from './operation'

const about = `JSON in, JSON out. Errors are application/problem+json (RFC 9457); bad input is 422 with the path of each mistake and a sentence that says what is allowed.
Unknown fields are refused. A session cookie or \`Authorization: Bearer <API token>\` tells who calls; a token with the scope \`read\` may read and evaluate.
Rows carry a version: a change names it by If-Match (missing: 428; stale: 409 with \`current\` and \`sent\`, both values). Lists answer \`items\` and \`next\`, the cursor of the next page or null.
Limits: 8 MB a body; order M up to 4096; 8 dimensions; 1,001 SNR values a row or call; 2,000 rows a request; 10,000 rows a sweep; 20,000 rows a study;
2,000 items a page. An evaluation above a cost limit is 422 and says what to reduce.`

/** Keys of the rules are routes, which the compiler does not conclude. */
const routes = Object.keys(rules) as Route[]

const refusal = (description: string) => ({ description, content: { 'application/problem+json': { schema: { $ref: '#/components/schemas/Problem' } } } })

/** What a rule and an operation can refuse, by status. */
function refusalsOf(route: Route, rule: Rule, { body, query, versioned, refusals }: Operation): Record<string, string> {
  const inStudy = typeof rule !== 'string'
  return {
    ...(rule !== 'anyone' && { 401: 'Nobody is signed in.' }),
    ...(rule !== 'anyone' && { 403: 'The caller\'s role, or their token\'s scope, does not allow this.' }),
    ...((inStudy || route.includes(':')) && { 404: 'There is no such thing, or it is not shared with the caller.' }),
    ...((body || versioned) && { 400: 'The request is not well formed.' }),
    ...(body && { 413: 'The body is too large.', 415: 'The body is not sent as JSON.' }),
    ...((body || query || route.includes(':')) && { 422: 'An input is not allowed; `errors` names each by its path.' }),
    ...(versioned && { 428: 'If-Match is missing.' }),
    ...refusals,
    ...(inStudy && rule.changes && { 409: [refusals?.[409], 'The study is archived: it is read-only until it is taken back into work.'].filter(Boolean).join(' Or: ') }),
    503: 'The database is away; try again after Retry-After seconds.',
  }
}

/** Schemas of all operations in one direction, named by operation and part. */
function schemasOf(parts: readonly ('body' | 'answer')[]): Record<string, z.ZodType> {
  return Object.fromEntries(routes.flatMap(route => parts.flatMap((part) => {
    const schema = operations[route][part]
    return schema ? [[`${nameOf(route)}${part === 'body' ? 'Body' : 'Answer'}`, schema]] : []
  })))
}

/** A route as one word: `getStudiesIdMembers`. */
const nameOf = (route: Route) => route.toLowerCase().replace(/^(\w+) \/api\//, '$1/').replace(/[^a-z]+(\w)/g, (_, letter: string) => letter.toUpperCase())

interface Described { sent: DescribedSchemas, answered: DescribedSchemas }

function parametersOf(route: Route, { query, versioned, media }: Operation): JsonSchema[] {
  const path = [...route.matchAll(/:(\w+)/g)].map(([, name]) => ({ name, in: 'path', required: true, schema: { type: 'string', format: 'uuid' } }))
  const properties = query ? z.toJSONSchema(query, { io: 'input' }).properties ?? {} : {}
  const asked = Object.entries(properties).map(([name, schema]) => ({ name, in: 'query', required: false, schema }))
  return [
    ...path, ...asked,
    ...(versioned ? [{ name: 'If-Match', in: 'header', required: true, description: 'version that the change is based on, as in "3"', schema: { type: 'string' } }] : []),
    ...(media === 'text/event-stream' ? [{ name: 'Last-Event-ID', in: 'header', required: false, schema: { type: 'integer' } }] : []),
  ]
}

function successOf({ status = 200, answer, media }: Operation, { answered }: Described) {
  const description = STATUS_CODES[status]!
  if (answer) return { [status]: { description, content: { 'application/json': { schema: answered.referTo(answer) } } } }
  return { [status]: media ? { description, content: { [media]: {} } } : { description } }
}

function describeOperation(route: Route, described: Described) {
  const rule: Rule = rules[route]
  const operation = operations[route]
  const parameters = parametersOf(route, operation)
  return {
    operationId: nameOf(route),
    tags: [operation.tag],
    summary: operation.summary,
    ...(rule === 'anyone' && { security: [] }),
    ...(rule === 'session' && { security: [{ session: [] }] }),
    ...(parameters.length > 0 && { parameters }),
    ...(operation.body && { requestBody: { required: true, content: { 'application/json': { schema: described.sent.referTo(operation.body) } } } }),
    responses: {
      ...successOf(operation, described),
      ...Object.fromEntries(Object.entries(refusalsOf(route, rule, operation)).map(([status, text]) => [status, refusal(text)])),
    },
  }
}

/** The API's description (OpenAPI 3.1), made from the zod schemas, the access rules and the table of operations. */
export function apiDescription() {
  const described = { sent: describeSchemas('input', schemasOf(['body'])), answered: describeSchemas('output', schemasOf(['answer'])) }
  const paths: Record<string, Record<string, ReturnType<typeof describeOperation>>> = {}
  for (const route of routes) {
    const [method = '', path = ''] = route.split(' ')
    const key = path.replace(/:(\w+)/g, '{$1}')
    paths[key] = { ...paths[key], [method.toLowerCase()]: describeOperation(route, described) }
  }
  return {
    openapi: '3.1.0',
    info: { title: 'Halfplane', version, description: about, license: { name: 'MIT', identifier: 'MIT' } },
    security: [{ session: [] }, { token: [] }],
    paths,
    components: {
      schemas: { ...described.sent.schemas, ...described.answered.schemas },
      securitySchemes: {
        session: { type: 'apiKey', in: 'cookie', name: 'halfplane' },
        token: { type: 'http', scheme: 'bearer' },
      },
    },
  }
}
