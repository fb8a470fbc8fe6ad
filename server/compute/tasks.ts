import type { Evaluation, EvaluationRequest } from '#shared/modulation'
import type { Issue } from '#shared/schemas/common'
import type { CandidateConstellation } from '#shared/schemas/values'
import type { CanonicalInputs } from '#shared/study/canonical-inputs'
import type { Evaluated } from './evaluate-candidate'

/** What a worker can be asked, by kind, and what it answers. */
export interface Tasks {
  /** rows of the grid, in one message to save the cost of many */
  rows: { asked: CanonicalInputs[], answer: Evaluated[] }
  /** POST /api/evaluate; issues where the core refuses the request */
  evaluation: { asked: EvaluationRequest, answer: { evaluation: Evaluation } | { issues: Issue[] } }
  /** what the close-up of a row draws */
  constellation: { asked: NonNullable<CanonicalInputs['constellation']>, answer: CandidateConstellation }
}
export type TaskKind = keyof Tasks
export type Task<K extends TaskKind = TaskKind> = { [P in K]: { kind: P, asked: Tasks[P]['asked'] } }[K]
