import { and, eq, inArray, sql } from 'drizzle-orm'
import { partNames } from '#shared/schemas/parts'
import type { CandidateParts, PartValues, StoredPart } from '#shared/schemas/parts'
import type { Issue } from '#shared/schemas/common'
import type { BitErrorCurves, InformationCurves } from '#shared/schemas/values'
import type { Database, Transaction } from '../database/client'
import { resultParts } from '../database/schema'

/** Keys of one statement. */
const keysAtOnce = 1000

/** A part as it is found to be. */
export interface ComputedPart { key: string, part: StoredPart, values: PartValues | BitErrorCurves | InformationCurves | null, errors: Issue[] }

/** The parts of results that have been asked for, by key; curves are read one at a time. */
export async function partsOfKeys(db: Database | Transaction, keys: readonly string[]): Promise<Map<string, CandidateParts>> {
  const found = new Map<string, CandidateParts>()
  for (let i = 0; i < keys.length; i += keysAtOnce) {
    const rows = await db.select().from(resultParts)
      .where(and(inArray(resultParts.key, keys.slice(i, i + keysAtOnce)), inArray(resultParts.part, partNames)))
    for (const { key, part, state, values, errors } of rows) {
      found.set(key, { ...found.get(key), [part]: { state, values, errors } })
    }
  }
  return found
}

/** One part of a result; null when nobody has asked for it. */
export async function partOf(db: Database, key: string, part: StoredPart): Promise<typeof resultParts.$inferSelect | null> {
  const [row] = await db.select().from(resultParts).where(and(eq(resultParts.key, key), eq(resultParts.part, part)))
  return row ?? null
}

/** Notes that parts are being computed. Those that have been computed stay as they are. */
export async function notePartsAsked(tx: Database | Transaction, keys: readonly string[], part: StoredPart): Promise<void> {
  const sorted = [...new Set(keys)].sort()
  for (let i = 0; i < sorted.length; i += keysAtOnce) {
    await tx.insert(resultParts).ignore().values(sorted.slice(i, i + keysAtOnce).map(key => ({ key, part, errors: [] })))
  }
}

/** Stores computed parts in one statement; a part that is there already becomes what has been found. */
export async function storeParts(tx: Transaction, parts: readonly ComputedPart[]): Promise<void> {
  if (parts.length === 0) return
  await tx.insert(resultParts).values(parts
    .map(({ key, part, values, errors }) => ({ key, part, values, errors, state: errors.length > 0 ? 'failed' as const : 'computed' as const }))
    // Servers that store the same parts take their locks in one order.
    .sort((a, b) => a.key < b.key ? -1 : 1))
    .onDuplicateKeyUpdate({ set: { state: sql`values(\`state\`)`, values: sql`values(\`values\`)`, errors: sql`values(\`errors\`)` } })
}
