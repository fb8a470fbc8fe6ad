import type { Candidate } from '#shared/schemas/candidates'
import type { Problem } from '#shared/schemas/common'
import type { StudyEvent } from '#shared/schemas/events'
import type { Study } from '#shared/schemas/studies'
import type { Client } from '../support/client'

export type Refused = Problem & { current?: Candidate }
export interface Rows { items: Candidate[], next: string | null }

/** Creates a study of the test's own. */
export async function ownStudy(client: Client, name: string): Promise<string> {
  const { status, body } = await client.post<Study>('/api/studies', { name })
  if (status !== 201) throw new Error(`The study was not created: ${status} ${JSON.stringify(body)}`)
  return body.id
}

/** Creates one row and answers it. */
export async function ownRow(client: Client, study: string, inputs: object = {}): Promise<Candidate> {
  const { status, body } = await client.post<Candidate>(`/api/studies/${study}/candidates`, inputs)
  if (status !== 201) throw new Error(`The row was not created: ${status} ${JSON.stringify(body)}`)
  return body
}

/** All rows of a study, page by page. */
export async function allRows(client: Client, study: string): Promise<Candidate[]> {
  const rows: Candidate[] = []
  for (let next: string | null = ''; next !== null;) {
    const { body }: { body: Rows } = await client.get<Rows>(`/api/studies/${study}/candidates?limit=2000${next ? `&cursor=${next}` : ''}`)
    rows.push(...body.items)
    next = body.next
  }
  return rows
}

/** Changes a row as it was read. */
export const change = <Body = Candidate>(client: Client, row: Candidate, inputs: object) =>
  client.patch<Body>(`/api/candidates/${row.id}`, inputs, { 'if-match': `"${row.version}"` })

export interface Received { id: number | null, data: StudyEvent }

/** A study's open event stream. */
export class Stream {
  readonly received: Received[] = []
  /** resolves when the server has ended the stream */
  readonly ended: Promise<void>
  private readonly caller = new AbortController()
  private wake: () => void = () => {}

  private constructor(body: ReadableStream<Uint8Array>, caller: AbortController) {
    this.caller = caller
    this.ended = this.read(body)
  }

  /** Opens it; it is joined to the study's events when this resolves. */
  static async open(client: Client, study: string, lastEventId?: number, query = ''): Promise<Stream> {
    const caller = new AbortController()
    const headers = new Headers(lastEventId === undefined ? [] : [['last-event-id', String(lastEventId)]])
    const response = await client.fetch(`/api/studies/${study}/events${query}`, { signal: caller.signal, headers })
    if (response.status !== 200) throw new Error(`The stream was refused: ${response.status} ${await response.text()}`)
    const stream = new Stream(response.body!, caller)
    await stream.until(() => stream.received.length > 0)
    return stream
  }

  /** Waits until what has been received satisfies a condition. */
  async until(condition: () => boolean): Promise<void> {
    while (!condition()) {
      await new Promise<void>((resolve) => {
        this.wake = resolve
      })
    }
  }

  /** The last state of each row that has been received. */
  get rows(): Map<string, Candidate> {
    return new Map(this.received.flatMap(({ data }) => (data.rows ?? []).map(row => [row.id, row] as const)))
  }

  close(): Promise<void> {
    this.caller.abort()
    return this.ended
  }

  private async read(body: ReadableStream<Uint8Array>) {
    const decoder = new TextDecoder()
    const reader = body.getReader()
    let text = ''
    try {
      for (let part = await reader.read(); !part.done; part = await reader.read()) {
        const messages = (text + decoder.decode(part.value, { stream: true })).split('\n\n')
        text = messages.pop()!
        this.received.push(...messages.flatMap(parse))
        this.wake()
      }
    } catch (error) {
      if (!this.caller.signal.aborted) throw error
    }
  }
}

function parse(message: string): Received[] {
  const field = (name: string) => message.split('\n').find(line => line.startsWith(`${name}: `))?.slice(name.length + 2)
  const data = field('data')
  return data === undefined ? [] : [{ id: field('id') === undefined ? null : Number(field('id')), data: JSON.parse(data) as StudyEvent }]
}
