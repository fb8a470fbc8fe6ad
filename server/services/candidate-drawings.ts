import { and, eq, isNull } from 'drizzle-orm'
import type { BitErrorCurves, CandidateConstellation, CandidateCurves, CurveQuantity, InformationCurves } from '#shared/schemas/values'
import { canonicalPoints } from '#shared/study/canonical-inputs'
import type { CanonicalInputs } from '#shared/study/canonical-inputs'
import { familyOfRow } from '#shared/study/family-parameters'
import { constellationIssues } from '#shared/study/input-issues'
import { labelIssues, probabilityIssues } from '#shared/study/option-issues'
import { compute } from '../compute/pool'
import { useDatabase } from '../database/client'
import { candidates, studies } from '../database/schema'
import { problem } from '../utils/problem'
import { curvesOf } from './results'
import { rowKey } from './row-key'
import { partOf, storeParts } from './stored-parts'
import { transact } from './transactions'

async function rowOf(id: string) {
  const [row] = await useDatabase().select({ inputs: candidates.inputs, resultKey: candidates.resultKey, requirements: studies.requirements }).from(candidates)
    .innerJoin(studies, eq(studies.id, candidates.studyId))
    .where(and(eq(candidates.id, id), isNull(candidates.deletedAt)))
  return row ?? problem(404, 'This row does not exist, or has been deleted.')
}

/** SER of a row; 404 while it is computed, and for a row that has none. */
async function symbolErrors({ resultKey }: Awaited<ReturnType<typeof rowOf>>): Promise<CandidateCurves> {
  const curves = resultKey === null ? null : await curvesOf(useDatabase(), resultKey)
  if (curves === undefined) return problem(404, 'The curves of this row are being computed.')
  return curves ?? problem(404, 'This row has no curves: it has failed, or is an entered scheme without points.')
}

/**
 * BER or information rates of a row; computed when they are first asked for, and kept.
 * @throws a 422 problem for what the row lacks, at its field
 */
async function otherCurves(row: Awaited<ReturnType<typeof rowOf>>, part: 'curves-ber' | 'curves-rate', signal: AbortSignal) {
  const key = rowKey(row.inputs, row.requirements)
  if (!key.canonical) return problem(404, 'This row has no curves: it has failed.')
  const stored = await partOf(useDatabase(), key.resultKey, part)
  const { values, errors } = stored && stored.state !== 'computing' ? stored : await computeCurves(key, part, signal)
  return values && 'esN0Db' in values ? values : problem(422, errors[0]?.message ?? 'This row has no such curves.', { errors })
}

async function computeCurves({ resultKey, canonical }: { resultKey: string, canonical: CanonicalInputs }, part: 'curves-ber' | 'curves-rate', signal: AbortSignal) {
  const [evaluated] = await compute({ kind: 'part', asked: { part, rows: [canonical] } }, { priority: 'evaluation', signal })
  await transact(tx => storeParts(tx, [{ key: resultKey, part, ...evaluated! }]))
  return evaluated!
}

/** Curves of a row by what they show. */
export async function candidateCurves(id: string, quantity: CurveQuantity, signal: AbortSignal): Promise<CandidateCurves | BitErrorCurves | InformationCurves> {
  const row = await rowOf(id)
  if (quantity === 'ser') return symbolErrors(row)
  return otherCurves(row, quantity === 'ber' ? 'curves-ber' : 'curves-rate', signal)
}

/** What the close-up of a row draws; 404 for a row without points. */
export async function candidateConstellation(id: string, signal: AbortSignal): Promise<CandidateConstellation> {
  const { inputs, requirements } = await rowOf(id)
  if (!familyOfRow(inputs)) return problem(404, 'An entered scheme has no points to draw.')
  const [issue] = [...constellationIssues(inputs), ...labelIssues(inputs), ...probabilityIssues(inputs)]
  if (issue) return problem(404, `This row has no points to draw. ${issue.message}`)
  const points = { ...canonicalPoints(inputs)!, normalisation: { normalisation: 'meanEnergy' as const } }
  return compute({ kind: 'constellation', asked: { points, row: rowKey(inputs, requirements).canonical } }, { priority: 'interactive', signal })
}
