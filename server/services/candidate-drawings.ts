import { and, eq, isNull } from 'drizzle-orm'
import type { CandidateConstellation, CandidateCurves } from '#shared/schemas/values'
import { canonicalPoints } from '#shared/study/canonical-inputs'
import { familyOfRow } from '#shared/study/family-parameters'
import { constellationIssues } from '#shared/study/input-issues'
import { labelIssues, probabilityIssues } from '#shared/study/option-issues'
import { compute } from '../compute/pool'
import { useDatabase } from '../database/client'
import { candidates } from '../database/schema'
import { problem } from '../utils/problem'
import { curvesOf } from './results'

async function rowOf(id: string) {
  const [row] = await useDatabase().select({ inputs: candidates.inputs, resultKey: candidates.resultKey }).from(candidates)
    .where(and(eq(candidates.id, id), isNull(candidates.deletedAt)))
  return row ?? problem(404, 'This row does not exist, or has been deleted.')
}

/** Curves of a row; 404 while it is computed, and for a row that has none. */
export async function candidateCurves(id: string): Promise<CandidateCurves> {
  const { resultKey } = await rowOf(id)
  const curves = resultKey === null ? null : await curvesOf(useDatabase(), resultKey)
  if (curves === undefined) return problem(404, 'The curves of this row are being computed.')
  return curves ?? problem(404, 'This row has no curves: it has failed, or is an entered scheme without points.')
}

/** What the close-up of a row draws; 404 for a row without points. */
export async function candidateConstellation(id: string, signal: AbortSignal): Promise<CandidateConstellation> {
  const { inputs } = await rowOf(id)
  const family = familyOfRow(inputs)
  if (!family) return problem(404, 'An entered scheme has no points to draw.')
  const [issue] = [...constellationIssues(inputs), ...labelIssues(inputs), ...probabilityIssues(inputs)]
  if (issue) return problem(404, `This row has no points to draw. ${issue.message}`)
  return compute(
    { kind: 'constellation', asked: { ...canonicalPoints(inputs)!, normalisation: { normalisation: 'meanEnergy' } } },
    { priority: 'interactive', signal },
  )
}
