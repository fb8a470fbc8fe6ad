import type { CandidateInputs } from '../schemas/candidates'
import type { Issue } from '../schemas/common'
import type { Requirements } from '../schemas/requirements'
import { familyLabels } from '../modulation'
import { familyOfRow, familyParameters, rowSize } from './family-parameters'

/** Whether a row's required SNR rests on the error rate of its decisions, at least in part. */
const needsErrorRate = ({ family, basis }: CandidateInputs, { target }: Requirements) =>
  family !== 'entered' && (basis === 'uncoded' || (basis === 'rateThreshold' && target.stage === 'beforeDecoding'))

function hasLabels(inputs: CandidateInputs): boolean {
  if (inputs.labelling !== 'family') return true
  const { order } = rowSize(inputs)
  const family = familyOfRow(inputs)
  return family !== null && order !== null && Number.isInteger(Math.log2(order)) && familyLabels(family.id, familyParameters(inputs)) !== null
}

/** What a row lacks for the study's target, told at the row's field that remedies it. */
export function targetIssues(inputs: CandidateInputs, requirements: Requirements): Issue[] {
  if (requirements.target.quantity !== 'ber' || !needsErrorRate(inputs, requirements)) return []
  const byFactors = inputs.family === 'product' || inputs.family === 'hypercube'
  if (!byFactors && (rowSize(inputs).dimensions ?? 1) > 2) {
    return [{ path: 'basis', message: 'The target is a bit error rate, which is exact for one and two dimensions and for products of such sets only: use a rate threshold or an entered basis, or a target SER.' }]
  }
  return hasLabels(inputs)
    ? []
    : [{ path: 'labelling', message: 'The target is a bit error rate and these points have no labels: take a power of two of points, enter labels of your own, or use a target SER.' }]
}
