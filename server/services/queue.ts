import type { CanonicalInputs } from '#shared/study/canonical-inputs'
import type { Evaluated } from '../compute/evaluate-candidate'
import { compute, ComputationFailed } from '../compute/pool'
import type { Priority } from '../compute/pool'
import { useDatabase } from '../database/client'
import { finished } from './queue-results'
import { knownKeys } from './results'

/** A row that waits for the result under its key. */
export interface WaitingRow {
  id: string
  studyId: string
  sweepId: string | null
}

/** A computation that is to be done, and the rows that wait for it. */
export interface Computation {
  key: string
  inputs: CanonicalInputs
  rows: WaitingRow[]
}

/** Rows computed in one message, and points of all of them together: a few tens of milliseconds of one worker. */
const batchSize = 12
const batchPoints = 2500
/** Batches on their way at a time: those that are computed and the next. */
const batchesAtOnce = 3
/** From so many rows at a time on, nobody waits for a single one of them. */
const manyRows = 24
/** Keys asked for in one statement. */
const keysAtOnce = 1000

/** Computations asked for and not yet finished, by key; those in `bulk` have not begun. */
const pending = new Map<string, Computation>()
const bulk = new Map<string, Computation>()
let batches = 0

/**
 * Asks for the results of rows that have just been written. Those whose key has a result already need nothing;
 * the same key is computed once, however many rows wait for it.
 * @param rows any number; single rows go before everything else
 */
export async function enqueue(rows: readonly (WaitingRow & { key: string, inputs: CanonicalInputs })[]): Promise<void> {
  const priority: Priority = rows.length < manyRows ? 'interactive' : 'bulk'
  for (let i = 0; i < rows.length; i += keysAtOnce) {
    const some = rows.slice(i, i + keysAtOnce)
    const known = await knownKeys(useDatabase(), some.map(row => row.key))
    for (const row of some) {
      if (!known.has(row.key)) add(row, priority)
    }
  }
}

function add({ key, inputs, id, studyId, sweepId }: WaitingRow & { key: string, inputs: CanonicalInputs }, priority: Priority) {
  const row = { id, studyId, sweepId }
  const there = pending.get(key)
  if (there) {
    if (!there.rows.some(other => other.id === id)) there.rows.push(row)
    if (priority === 'interactive' && bulk.delete(key)) void alone(there)
    return
  }
  const computation = { key, inputs, rows: [row] }
  pending.set(key, computation)
  if (priority === 'interactive') {
    void alone(computation)
  } else {
    bulk.set(key, computation)
    pump()
  }
}

/** Whether this server is computing the result of a key. */
export function isPending(key: string): boolean {
  return pending.has(key)
}

/** Takes a cancelled sweep's rows out of what has not begun. */
export function forgetSweep(sweepId: string): void {
  for (const computation of bulk.values()) {
    computation.rows = computation.rows.filter(row => row.sweepId !== sweepId)
    if (computation.rows.length > 0) continue
    bulk.delete(computation.key)
    pending.delete(computation.key)
  }
}

function finish(computation: Computation, outcome: Evaluated | ComputationFailed, priority: Priority) {
  // From here on a row that asks for the key is a new computation: its event would come too late for this one.
  pending.delete(computation.key)
  finished(computation, outcome, priority)
}

async function alone(computation: Computation) {
  try {
    const [evaluated] = await compute({ kind: 'rows', asked: [computation.inputs] }, { priority: 'interactive' })
    finish(computation, evaluated!, 'interactive')
  } catch (error) {
    finish(computation, error instanceof ComputationFailed ? error : new ComputationFailed(error), 'interactive')
  }
}

function pump() {
  while (batches < batchesAtOnce && bulk.size > 0) void batch()
}

async function batch() {
  const some = [...take()]
  batches++
  try {
    const evaluated = await compute({ kind: 'rows', asked: some.map(one => one.inputs) }, { priority: 'bulk', attempts: 1 })
    some.forEach((computation, n) => finish(computation, evaluated[n]!, 'bulk'))
  } catch {
    // One of the rows broke the worker: each is tried again by itself, and only that one fails.
    await Promise.all(some.map(again))
  } finally {
    batches--
    pump()
  }
}

async function again(computation: Computation) {
  try {
    const [evaluated] = await compute({ kind: 'rows', asked: [computation.inputs] }, { priority: 'bulk', attempts: 1 })
    finish(computation, evaluated!, 'bulk')
  } catch (error) {
    finish(computation, error instanceof ComputationFailed ? error : new ComputationFailed(error), 'bulk')
  }
}

/** The next rows of a batch: one at least. */
function* take() {
  let rows = 0
  let points = 0
  for (const [key, computation] of bulk) {
    points += pointsOf(computation.inputs)
    if (rows > 0 && (rows === batchSize || points > batchPoints)) return
    rows++
    bulk.delete(key)
    yield computation
  }
}

function pointsOf({ constellation }: CanonicalInputs): number {
  const { order, rings, points } = constellation?.parameters ?? {}
  return points?.length ?? order ?? rings?.reduce((sum, n) => sum + n, 0) ?? 0
}
