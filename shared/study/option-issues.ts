import { ModulationError } from '../modulation'
import { checkLabels, checkProbabilities } from '../modulation/constellation-checks'
import type { CandidateField, CandidateInputs } from '../schemas/candidates'
import type { Issue } from '../schemas/common'
import { rowSize } from './family-parameters'

const at = (path: CandidateField, message: string): Issue => ({ path, message })

function refusedBy(check: () => void): Issue[] {
  try {
    check()
    return []
  } catch (error) {
    if (!(error instanceof ModulationError)) throw error
    return [{ path: error.path.join('.'), message: error.message }]
  }
}

/** Whether a row's symbols have probabilities of their own. */
export const isShaped = ({ family, probabilityRule }: CandidateInputs) => family !== 'entered' && probabilityRule !== 'equal'

/** Whether a row is decided by MAP and that differs from minimum distance. */
export const decidesByMap = (inputs: CandidateInputs) => inputs.decision === 'map' && isShaped(inputs)

/** Labels of the user's own against the row's points. */
export function labelIssues(inputs: CandidateInputs): Issue[] {
  const { order } = rowSize(inputs)
  if (inputs.labelling === 'natural' && order !== null && !Number.isInteger(Math.log2(order))) {
    return [at('labelling', 'Labels need a power of two of points: choose the family\'s, which then has none, or another order.')]
  }
  if (inputs.labelling !== 'own') return []
  if (!inputs.labels) return [at('labels', 'Enter your labels: a word of k bits for each point, in the order of the points.')]
  return order === null ? [] : refusedBy(() => checkLabels(inputs.labels!, order))
}

/** Probabilities against the row's points. */
export function probabilityIssues(inputs: CandidateInputs): Issue[] {
  const { order } = rowSize(inputs)
  if (inputs.probabilityRule === 'own') {
    if (!inputs.probabilities) return [at('probabilities', 'Enter your probabilities: one above 0 for each point, of the sum 1.')]
    return order === null ? [] : refusedBy(() => checkProbabilities(inputs.probabilities!, order))
  }
  if (inputs.probabilityRule !== 'shaped') return []
  const { shapedEntropy } = inputs
  const most = order === null ? 12 : Math.log2(order)
  return shapedEntropy === null || shapedEntropy > most * (1 + 1e-12)
    ? [at('shapedEntropy', `Enter the wanted entropy H: above 0 and up to ${Number(most.toFixed(3))} bit, the bits per symbol k.`)]
    : []
}

/** The channel's own parameters, and what cannot stand beside it. */
export function channelIssues(inputs: CandidateInputs): Issue[] {
  const { channel, ricianKDb, nakagamiM, phaseErrorDeg, basis } = inputs
  const { dimensions } = rowSize(inputs)
  const fading = channel !== 'awgn'
  const beyond = dimensions !== null && dimensions > 2
  return [
    ...channel === 'rician' && ricianKDb === null ? [at('ricianKDb', 'Enter the Rician K, direct over scattered power, from −60 to 60 dB.')] : [],
    ...channel === 'nakagami' && nakagamiM === null ? [at('nakagamiM', 'Enter the Nakagami m from 0.5 to 100; 1 is Rayleigh fading.')] : [],
    ...decidesByMap(inputs) && fading ? [at('decision', 'MAP decisions with fading are refused: decide by minimum distance, or use the AWGN channel.')] : [],
    ...decidesByMap(inputs) && beyond ? [at('decision', 'MAP decisions are offered for one and two dimensions: decide by minimum distance.')] : [],
    ...fading && basis === 'rateThreshold' ? [at('channel', 'A rate threshold is for the AWGN channel: use it, or the basis uncoded or entered.')] : [],
    ...phaseErrorDeg > 0 ? phaseErrorIssues(inputs, dimensions) : [],
  ]
}

function phaseErrorIssues(inputs: CandidateInputs, dimensions: number | null): Issue[] {
  if (inputs.channel !== 'awgn') return [at('phaseErrorDeg', 'A phase error with fading is refused: enter 0, or use the AWGN channel.')]
  if (decidesByMap(inputs)) return [at('phaseErrorDeg', 'A phase error with MAP decisions is refused: enter 0, or decide by minimum distance.')]
  if (dimensions !== null && dimensions !== 2) return [at('phaseErrorDeg', 'A phase error turns points of two dimensions: enter 0 for this row.')]
  return inputs.basis === 'rateThreshold' ? [at('phaseErrorDeg', 'A rate threshold is without a phase error: enter 0, or use the basis uncoded or entered.')] : []
}
