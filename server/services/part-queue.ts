import { setTimeout } from 'node:timers/promises'
import { and, inArray, isNull } from 'drizzle-orm'
import type { StoredPart } from '#shared/schemas/parts'
import type { CanonicalInputs } from '#shared/study/canonical-inputs'
import { compute, ComputationFailed } from '../compute/pool'
import { candidates } from '../database/schema'
import { groupBy } from '../utils/group-by'
import { appendEvent, lockStudy } from './events'
import { storeParts } from './stored-parts'
import type { ComputedPart } from './stored-parts'
import { transact } from './transactions'

/** A part of a result that is to be computed. */
export interface WaitingPart { key: string, part: StoredPart, inputs: CanonicalInputs }

/** Rows of one message: heavy ones take up to a second each. */
const batchSize = 4
/** Batches on their way at a time: the rows of sweeps and edits of studies go in between. */
const batchesAtOnce = 2
/** Results are stored and told together, this often at most, in milliseconds. */
const storeEvery = 250
/** How long a database that is away is left alone, in milliseconds, and how often it is asked. */
const patience = 1000
const attempts = 60

const pending = new Set<string>()
const waiting = new Map<string, WaitingPart>()
let batches = 0
let found: ComputedPart[] = []
let timer: NodeJS.Timeout | undefined
let storing: Promise<void> = Promise.resolve()

const nameOf = ({ key, part }: Pick<WaitingPart, 'key' | 'part'>) => `${part} ${key}`

/** Whether this server is computing a part. */
export const isPartPending = (part: Pick<WaitingPart, 'key' | 'part'>): boolean => pending.has(nameOf(part))

/** Has parts computed behind everything that somebody edits; each once, however often it is asked for. */
export function enqueueParts(parts: readonly WaitingPart[]): void {
  for (const part of parts) {
    const name = nameOf(part)
    if (pending.has(name)) continue
    pending.add(name)
    waiting.set(name, part)
  }
  pump()
}

function pump() {
  while (batches < batchesAtOnce && waiting.size > 0) void batch()
}

/** The next parts of one kind. */
function take(): WaitingPart[] {
  const some: WaitingPart[] = []
  for (const [name, part] of waiting) {
    if (some.length === batchSize || (some[0] && some[0].part !== part.part)) break
    waiting.delete(name)
    some.push(part)
  }
  return some
}

async function evaluate(some: readonly WaitingPart[]) {
  const evaluated = await compute({ kind: 'part', asked: { part: some[0]!.part, rows: some.map(one => one.inputs) } }, { priority: 'bulk', attempts: 1 })
  some.forEach(({ key, part }, n) => finish({ key, part, ...evaluated[n]! }))
}

async function batch() {
  const some = take()
  batches++
  try {
    await evaluate(some)
  } catch {
    // One of the rows broke the worker: each is tried again by itself, and only that one fails.
    for (const one of some) await evaluate([one]).catch((error: unknown) => fail(one, error))
  } finally {
    batches--
    pump()
  }
}

function fail({ key, part }: WaitingPart, error: unknown) {
  const { message } = error instanceof ComputationFailed ? error : new ComputationFailed(error)
  finish({ key, part, values: null, errors: [{ path: 'family', message }] })
}

function finish(part: ComputedPart) {
  found.push(part)
  timer ??= globalThis.setTimeout(flush, storeEvery)
}

function flush() {
  timer = undefined
  const some = found
  found = []
  storing = storing.then(() => store(some))
}

async function store(some: ComputedPart[]): Promise<void> {
  for (let attempt = 1; ; attempt++) {
    try {
      await transact(async (tx) => {
        const rows = await tx.select({ id: candidates.id, studyId: candidates.studyId }).from(candidates)
          .where(and(inArray(candidates.resultKey, some.map(({ key }) => key)), isNull(candidates.deletedAt)))
        await storeParts(tx, some)
        // The studies in one order, in which every server locks them.
        for (const [studyId, its] of [...groupBy(rows, row => row.studyId)].sort(([a], [b]) => a < b ? -1 : 1)) {
          await lockStudy(tx, studyId)
          await appendEvent(tx, studyId, { candidates: its.map(row => row.id) })
        }
      })
      break
    } catch (error) {
      console.error(`Parts of ${some.length} rows could not be stored (attempt ${attempt}).`, error)
      // They stay noted as being computed, and are found as such later.
      if (attempt === attempts) break
      await setTimeout(patience)
    }
  }
  for (const part of some) pending.delete(nameOf(part))
}
