import { ModulationError } from '#shared/modulation'
import type { CandidateInputs } from '#shared/schemas/candidates'
import type { Issue } from '#shared/schemas/common'
import type { Requirements } from '#shared/schemas/requirements'
import { canonicalInputs } from '#shared/study/canonical-inputs'
import type { CanonicalInputs } from '#shared/study/canonical-inputs'
import { inputIssues } from '#shared/study/input-issues'
import { targetIssues } from '#shared/study/target-issues'
import { resultKey } from '../compute/result-key'

/** Where a row's result is found, or why it can have none. */
export type RowKey = { resultKey: string, errors: [], canonical: CanonicalInputs } | { resultKey: null, errors: Issue[], canonical: null }

/** Key of a row in its study; the errors are at the row's fields, or at the study's requirements. */
export function rowKey(inputs: CandidateInputs, requirements: Requirements): RowKey {
  const contradictions = inputIssues(inputs)
  const errors = contradictions.length > 0 ? contradictions : targetIssues(inputs, requirements)
  if (errors.length > 0) return { resultKey: null, errors, canonical: null }
  try {
    const canonical = canonicalInputs(inputs, requirements)
    return { resultKey: resultKey(canonical), errors: [], canonical }
  } catch (error) {
    if (!(error instanceof ModulationError)) throw error
    return { resultKey: null, errors: [{ path: ['requirements.available', ...error.path].join('.'), message: error.message }], canonical: null }
  }
}
