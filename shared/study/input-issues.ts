import type { CandidateField, CandidateInputs } from '../schemas/candidates'
import type { Issue } from '../schemas/common'
import { familyOfRow, familyParameters, rowSize } from './family-parameters'
import { geometrySeconds, latticePointsWithin, latticeSeconds } from './geometry-cost'
import { channelIssues, labelIssues, probabilityIssues } from './option-issues'
import { mostValues, valuesOfRange } from './snr-grid'

const fieldOf: Partial<Record<string, CandidateField>> = { phases: 'phasesDeg' }

const at = (path: CandidateField, message: string): Issue => ({ path, message })

/** What is wrong with the parameters of a row's family. */
export function constellationIssues(inputs: CandidateInputs): Issue[] {
  const family = familyOfRow(inputs)
  if (!family) return []
  const issues = family.validate(familyParameters(inputs)).map(({ path: [field, ...rest], message }) => ({
    path: [fieldOf[String(field)] ?? field, ...rest].join('.'), message,
  }))
  return issues.length > 0 ? issues : costIssues(inputs)
}

/** Longest that the neighbours of a row's points may take to find, in seconds by estimate. */
const longestGeometry = 60

const mostOf = (lattice: NonNullable<CandidateInputs['lattice']>) => latticePointsWithin(lattice, longestGeometry).toLocaleString('en')

function costIssues(inputs: CandidateInputs): Issue[] {
  const { order, dimensions } = rowSize(inputs)
  if (inputs.family === 'custom' && geometrySeconds(order ?? 0, dimensions ?? 0) > longestGeometry) {
    return [at('points', `${order!.toLocaleString('en')} points of ${dimensions} coordinates would take minutes: enter fewer, or a family of the list.`)]
  }
  if (inputs.family === 'lattice' && latticeSeconds(inputs) > longestGeometry) {
    return [at('order', `${order!.toLocaleString('en')} points of ${inputs.lattice} would take minutes: at most ${mostOf(inputs.lattice!)} are allowed.`)]
  }
  return inputs.family === 'product' && latticeSeconds({ factors: inputs.factors }) > longestGeometry
    ? [at('factors', `The lattice cuts among these factors would take minutes: a cut of E8 has at most ${mostOf('E8')} points.`)]
    : []
}

function basisIssues(inputs: CandidateInputs): Issue[] {
  if (inputs.family === 'entered') {
    return [
      ...inputs.basis === 'entered' ? [] : [at('basis', 'An entered scheme has the basis entered.')],
      ...inputs.enteredEsN0Db === null ? [at('enteredEsN0Db', 'Enter the required Es/N0 of this scheme, from −60 to 120 dB.')] : [],
      ...inputs.enteredNetBits === null ? [at('enteredNetBits', 'Enter the net bits per symbol of this scheme, above 0 and up to 64.')] : [],
    ]
  }
  if (inputs.basis === 'entered') {
    return inputs.enteredEsN0Db === null ? [at('enteredEsN0Db', 'The basis is entered: enter the required Es/N0, from −60 to 120 dB.')] : []
  }
  if (inputs.basis === 'rateThreshold') return thresholdIssues(inputs)
  return inputs.codeRate < 1
    ? [at('codeRate', 'A code rate below 1 with an uncoded basis is refused: it would charge for the code and credit nothing. Use 1, or the basis rate threshold or entered.')]
    : []
}

function thresholdIssues({ codeRate, decoderGapDb }: CandidateInputs): Issue[] {
  return [
    ...codeRate === 1 ? [at('codeRate', 'A rate threshold is for a code rate below 1: at 1 no SNR is enough. Enter a code rate such as 3/4, or use the basis uncoded.')] : [],
    ...decoderGapDb === null ? [at('decoderGapDb', 'Enter how far the decoder stays above the rate threshold, from 0 to 60 dB; 0 is an ideal code.')] : [],
  ]
}

function backOffIssues(inputs: CandidateInputs): Issue[] {
  if (inputs.family === 'entered' && inputs.backOff !== 'entered') {
    return [at('backOff', 'An entered scheme has an entered back-off: there are no points to find one from.')]
  }
  return inputs.backOff === 'entered' && inputs.backOffDb === null ? [at('backOffDb', 'Enter the back-off, from 0 to 60 dB.')] : []
}

function rangeIssues({ snrStart, snrStop, snrStep }: CandidateInputs): Issue[] {
  if (snrStop < snrStart) return [at('snrStop', 'The SNR range runs backwards: its stop is at or above its start.')]
  return valuesOfRange(snrStart, snrStop, snrStep) > mostValues
    ? [at('snrStep', 'An SNR range has at most 1,001 values: enter a larger step or a shorter range.')]
    : []
}

/** Contradictions between a row's inputs other than its family's parameters. */
export function settingIssues(inputs: CandidateInputs): Issue[] {
  const spacingMissing = inputs.family !== 'entered' && inputs.normalisation === 'minimumDistance' && inputs.spacing === null
  return [
    ...spacingMissing ? [at('spacing', 'Enter the spacing, the minimum distance in signal units, from 1e-9 to 1e9.')] : [],
    ...basisIssues(inputs), ...backOffIssues(inputs), ...rangeIssues(inputs),
    ...inputs.family === 'entered' ? [] : [...labelIssues(inputs), ...probabilityIssues(inputs), ...channelIssues(inputs)],
  ]
}

/**
 * Contradictions within a row, each at the field to change, with a sentence that says what is allowed.
 * The limits of single fields are the schema's (candidateInputs) and hold already.
 * @returns empty when the row can be computed
 */
export function inputIssues(inputs: CandidateInputs): Issue[] {
  return [...constellationIssues(inputs), ...settingIssues(inputs)]
}
