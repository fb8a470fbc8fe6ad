import type { Evaluation, EvaluationRequest } from '#shared/modulation'
import type { CheckOutcome } from '#shared/methods/checks'
import type { Issue } from '#shared/schemas/common'
import type { StoredPart } from '#shared/schemas/parts'
import type { CandidateConstellation } from '#shared/schemas/values'
import type { CanonicalInputs } from '#shared/study/canonical-inputs'
import type { DrawnRow } from './draw-constellation'
import type { Evaluated } from './evaluate-candidate'
import type { EvaluatedPart } from './evaluate-part'
import type { search, SearchState, SearchTask } from './search'

/** What a worker can be asked, by kind, and what it answers. */
export interface Tasks {
  /** rows of the grid, in one message to save the cost of many */
  rows: { asked: CanonicalInputs[], answer: Evaluated[] }
  /** a part of rows' columns or curves that needs heavy work */
  part: { asked: { part: StoredPart, rows: CanonicalInputs[] }, answer: EvaluatedPart[] }
  /** POST /api/evaluate; issues where the core refuses the request */
  evaluation: { asked: EvaluationRequest, answer: { evaluation: Evaluation } | { issues: Issue[] } }
  /** a slice of a search; `state` null: its beginning */
  search: { asked: { task: SearchTask, state: SearchState | null, milliseconds: number }, answer: ReturnType<typeof search> }
  /** what the close-up of a row draws */
  constellation: { asked: DrawnRow, answer: CandidateConstellation }
  /** what this build computes for every published value */
  checks: { asked: null, answer: CheckOutcome[] }
}
export type TaskKind = keyof Tasks
export type Task<K extends TaskKind = TaskKind> = { [P in K]: { kind: P, asked: Tasks[P]['asked'] } }[K]
