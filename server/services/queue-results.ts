import { setTimeout } from 'node:timers/promises'
import { and, eq, inArray } from 'drizzle-orm'
import type { Evaluated } from '../compute/evaluate-candidate'
import { ComputationFailed } from '../compute/pool'
import type { Priority } from '../compute/pool'
import type { Transaction } from '../database/client'
import { candidates } from '../database/schema'
import { groupBy } from '../utils/group-by'
import { appendEvent, lockStudy } from './events'
import type { Computation } from './queue'
import { storeResults } from './results'
import { finishSweep } from './sweep-state'
import { transact } from './transactions'

interface Finished { computation: Computation, outcome: Evaluated | ComputationFailed }

/** Bulk results are stored and told together, this often at most, in milliseconds. */
const bulkEvery = 150
/** … or as soon as there are so many. */
const bulkCount = 200
/** How long a database that is away is left alone, in milliseconds. */
const patience = 1000
const attempts = 60

let bulk: Finished[] = []
let timer: NodeJS.Timeout | undefined
let storing: Promise<void> = Promise.resolve()

/** Stores a result and tells the open pages: at once for interactive work, many together for bulk work. */
export function finished(computation: Computation, outcome: Evaluated | ComputationFailed, priority: Priority): void {
  if (priority === 'interactive') {
    void store([{ computation, outcome }])
    return
  }
  bulk.push({ computation, outcome })
  if (bulk.length >= bulkCount) flush()
  else timer ??= globalThis.setTimeout(flush, bulkEvery)
}

function flush() {
  clearTimeout(timer)
  timer = undefined
  const some = bulk
  bulk = []
  storing = storing.then(() => store(some))
}

async function store(some: Finished[]): Promise<void> {
  for (let attempt = 1; some.length > 0; attempt++) {
    try {
      return await transact(tx => write(tx, some))
    } catch (error) {
      console.error(`Results of ${some.length} rows could not be stored (attempt ${attempt}).`, error)
      // The rows stay without a result, and are found as such later.
      if (attempt === attempts) return
      await setTimeout(patience)
    }
  }
}

async function write(tx: Transaction, some: Finished[]) {
  await storeResults(tx, some.flatMap(({ computation: { key }, outcome }) => outcome instanceof ComputationFailed ? [] : [{ key, evaluated: outcome }]))
  for (const { computation: { key, rows }, outcome } of some) {
    if (outcome instanceof ComputationFailed) await failRows(tx, key, rows.map(row => row.id), outcome)
  }
  for (const [studyId, rows] of studiesOf(some)) {
    await lockStudy(tx, studyId)
    const running: string[] = []
    for (const sweepId of new Set(rows.flatMap(row => row.sweepId ?? []))) {
      if (await finishSweep(tx, sweepId)) running.push(sweepId)
    }
    const [first, ...others] = running
    await appendEvent(tx, studyId, { candidates: [...new Set(rows.map(row => row.id))], ...(first ? { sweep: first } : {}) })
    for (const sweep of others) await appendEvent(tx, studyId, { sweep })
  }
}

/** A row whose computation breaks down has no key, so that the next change of it is a new attempt. */
async function failRows(tx: Transaction, key: string, ids: string[], { message }: ComputationFailed) {
  await tx.update(candidates).set({ resultKey: null, errors: [{ path: 'family', message }] })
    .where(and(inArray(candidates.id, ids), eq(candidates.resultKey, key)))
}

/** Rows by study, the studies in one order, in which every server locks them. */
function studiesOf(some: readonly Finished[]) {
  return [...groupBy(some.flatMap(({ computation }) => computation.rows), row => row.studyId)].sort(([a], [b]) => a < b ? -1 : 1)
}
