import { and, eq, isNull, sql } from 'drizzle-orm'
import { defaultInputs } from '#shared/schemas/candidates'
import type { Candidate, CandidateChange, CandidateField, CandidateInputs, CandidatesCreation } from '#shared/schemas/candidates'
import type { Issue } from '#shared/schemas/common'
import type { Account } from '#shared/schemas/session'
import { describeCandidate } from '#shared/study/describe-candidate'
import { inputIssues } from '#shared/study/input-issues'
import { useDatabase } from '../database/client'
import type { Database, Transaction } from '../database/client'
import { candidates } from '../database/schema'
import { problem } from '../utils/problem'
import { recordActivity } from './activity'
import { liveIds, positionsBehind } from './candidate-positions'
import { rowsAfter, rowsOf } from './candidate-rows'
import { clearReference, enqueueWritten, insertRows, lockedStudy, requireRoom } from './candidate-writing'
import { appendEvent } from './events'
import { rowKey } from './row-key'
import { transact } from './transactions'

export { copyCandidates, rekeyStudy } from './candidate-keys'

/**
 * A page of a study's rows in the order of the grid.
 * @param cursor of the page before, as it was answered
 */
export async function listCandidates(studyId: string, { cursor, limit }: { cursor?: string, limit: number }) {
  const after = cursor === undefined ? null : readCursor(cursor)
  const items = await rowsAfter(useDatabase(), studyId, after, limit)
  const last = items.at(-1)
  return { items, next: last && items.length === limit ? `${last.position}_${last.id}` : null }
}

function readCursor(cursor: string) {
  const [position, id] = cursor.split('_')
  if (!id || !position || !Number.isFinite(Number(position))) {
    return problem(422, 'This is no cursor of this list.', { errors: [{ path: 'cursor', message: 'Send `next` of the page before.' }] })
  }
  return { position: Number(position), id }
}

/** One row; 404 when it is deleted. */
export async function getCandidate(id: string, db: Database | Transaction = useDatabase()): Promise<Candidate> {
  const [row] = await rowsOf(db, [id])
  return row ?? problem(404, 'This row does not exist, or has been deleted.')
}

/** Inputs of a new row: what is given over the defaults, named after its family unless it has a name. */
export function newInputs(given: CandidateChange): CandidateInputs {
  const inputs = { ...defaultInputs, ...given }
  return { ...inputs, name: given.name ?? describeCandidate(inputs) }
}

/**
 * Creates rows; any mistake in one of them refuses all.
 * @returns the rows, in the order given
 */
export async function createCandidates(studyId: string, creation: CandidatesCreation, by: Account): Promise<Candidate[]> {
  const { items, after, many } = 'items' in creation
    ? { items: creation.items, after: creation.after, many: true }
    : { items: [creation], after: undefined, many: false }
  const rows = items.map(newInputs)
  refuse(rows.flatMap((row, i) => inputIssues(row).map(({ path, message }) => ({ path: many ? `items.${i}.${path}` : path, message }))))
  const references = rows.flatMap((row, i) => row.role === 'reference' ? [i] : [])
  if (references.length > 1) refuse([{ path: `items.${references[1]}.role`, message: 'A study has one reference row.' }])

  const written = await transact(async (tx) => {
    const study = await lockedStudy(tx, studyId)
    await requireRoom(tx, studyId, rows.length)
    const cleared = references.length > 0 ? await clearReference(tx, studyId, null) : []
    const { positions, renumbered } = await positionsBehind(tx, studyId, after, rows.length)
    const inserted = await insertRows(tx, study, rows.map((inputs, i) => ({ inputs, position: positions[i]! })))
    const ids = renumbered ? await liveIds(tx, studyId) : [...cleared, ...inserted.map(row => row.id)]
    await appendEvent(tx, studyId, { candidates: ids })
    await recordActivity(tx, { study, by, action: 'created candidates', subject: subjectOf(rows) })
    return inserted
  })
  await enqueueWritten(written)
  return rowsOf(useDatabase(), written.map(row => row.id))
}

/** Rows in a few words, for activity. */
export function subjectOf(rows: readonly { name: string }[]): string {
  return rows.length === 1 ? rows[0]!.name : `${rows.length.toLocaleString('en')} rows`
}

function refuse(errors: Issue[]): void {
  if (errors.length > 0) problem(422, errors.length === 1 ? errors[0]!.message : `${errors.length} inputs are not allowed.`, { errors })
}

/**
 * Changes a row's inputs; its computed cells follow as an event. Mistakes in the fields that are changed refuse the
 * change; what they mean for other fields is saved, and the row says there what is allowed.
 * @param version the row's version that the change is based on
 */
export async function changeCandidate(studyId: string, id: string, change: CandidateChange, version: number, by: Account): Promise<Candidate> {
  const { written, candidate } = await transact(async (tx) => {
    const study = await lockedStudy(tx, studyId)
    const [row] = await tx.select().from(candidates)
      .where(and(eq(candidates.id, id), eq(candidates.studyId, studyId), isNull(candidates.deletedAt))).for('update')
    if (!row) return problem(404, 'This row does not exist, or has been deleted.')
    if (row.version !== version) {
      const [current] = await rowsOf(tx, [id])
      return problem(409, 'Somebody has changed this row since you read it. Its present values are sent with this answer.', { current, sent: change })
    }
    const inputs = merged(row.inputs, change)
    const errors = inputIssues(inputs).filter(({ path }) => path.split('.')[0]! in change)
    refuse(errors)
    const fields = changedFields(row.inputs, inputs)
    if (fields.length === 0) return { written: [], candidate: await getCandidate(id, tx) }
    const cleared = inputs.role === 'reference' && row.inputs.role !== 'reference' ? await clearReference(tx, studyId, id) : []
    const key = rowKey(inputs, study.requirements)
    await tx.update(candidates)
      .set({ inputs, resultKey: key.resultKey, errors: key.errors, version: version + 1, updatedAt: sql`current_timestamp(3)` })
      .where(eq(candidates.id, id))
    await appendEvent(tx, studyId, { candidates: [id, ...cleared] })
    await recordActivity(tx, {
      study, by, action: 'changed candidate', subject: inputs.name, from: part(row.inputs, fields), to: part(inputs, fields),
    })
    // Read before the lock goes: the answer holds this change and nobody else's, so that the next may be based on it.
    return { written: [{ id, studyId, sweepId: row.sweepId, key }], candidate: await getCandidate(id, tx) }
  })
  await enqueueWritten(written)
  return candidate
}

/** Changed inputs; a row that is still called after its parameters is called after the new ones. */
function merged(old: CandidateInputs, change: CandidateChange): CandidateInputs {
  const inputs = { ...old, ...change }
  return change.name === undefined && old.name === describeCandidate(old) ? { ...inputs, name: describeCandidate(inputs) } : inputs
}

function changedFields(old: CandidateInputs, inputs: CandidateInputs): CandidateField[] {
  return (Object.keys(inputs) as CandidateField[]).filter(field => JSON.stringify(old[field]) !== JSON.stringify(inputs[field]))
}

/** Longest list kept in the activity: a constellation's points are told by their number. */
const longestList = 64

function part(inputs: CandidateInputs, fields: readonly CandidateField[]) {
  return Object.fromEntries(fields.map((field) => {
    const value = inputs[field]
    return [field, Array.isArray(value) && value.length > longestList ? `${value.length} points` : value]
  }))
}
