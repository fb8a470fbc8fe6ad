import { eq, inArray } from 'drizzle-orm'
import { coreVersion } from '#shared/modulation'
import type { CandidateCurves } from '#shared/schemas/values'
import type { Evaluated } from '../compute/evaluate-candidate'
import type { Database, Transaction } from '../database/client'
import { results } from '../database/schema'

/** Keys among those given that have a result. */
export async function knownKeys(db: Database | Transaction, keys: readonly string[]): Promise<Set<string>> {
  if (keys.length === 0) return new Set()
  const rows = await db.select({ key: results.key }).from(results).where(inArray(results.key, [...keys]))
  return new Set(rows.map(row => row.key))
}

/** Stores results by their keys in one statement. One that is there already stays: the same key is the same result. */
export async function storeResults(tx: Transaction, computed: readonly { key: string, evaluated: Evaluated }[]): Promise<void> {
  if (computed.length === 0) return
  await tx.insert(results).ignore().values(computed
    .map(({ key, evaluated }) => ({ key, coreVersion, ...evaluated }))
    // Servers that store the same keys take their locks in one order.
    .sort((a, b) => a.key < b.key ? -1 : 1))
}

/** Curves under a key: undefined while there is no result, null where a result has none. */
export async function curvesOf(db: Database, key: string): Promise<CandidateCurves | null | undefined> {
  const [row] = await db.select({ curves: results.curves }).from(results).where(eq(results.key, key))
  return row?.curves
}
