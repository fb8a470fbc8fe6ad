import { tolerances } from '../methods/tolerances'
import { highOf, isInterval, lowOf, mapEstimate, valueOf } from '../modulation/estimate'
import type { Estimate } from '../modulation/estimate'
import type { CandidateValues } from '../schemas/values'
import type { ColumnContext } from './column'
import { estimateColumn, numberInput, shown, textInput, valueColumn } from './make'
import type { Candidate, CandidateInputs } from '../schemas/candidates'

const group = 'Required SNR' as const
const tolerance = tolerances.requiredDb

const target = (context: ColumnContext) => shown(context.requirements?.target.value, '0.00e-0')

const rateNames = { bitMetricRate: 'bit-metric rate', mutualInformation: 'mutual information' } as const
const errorNames = { serExact: 'exact SER', serUnion: 'SER by the union bound', berExact: 'exact BER' } as const

/** Of a rate threshold: the threshold with the decoder's gap, and what the target asks before decoding. */
const thresholdLines = (v: CandidateValues, kind: keyof typeof rateNames, { decoderGapDb }: CandidateInputs, { requirements }: ColumnContext) => requirements?.target.stage === 'beforeDecoding'
  ? [
      `the ${rateNames[kind]} reaches R = ${shown(v.netBits, '0.000')} bit/symbol, ${shown(decoderGapDb)} dB of decoder gap are added`,
      `the target holds before decoding: the greater of that and the Es/N0 at which the error rate meets it counts, ${shown(v.requiredEsN0Db)} dB`,
    ]
  : [
      `the ${rateNames[kind]} reaches R = ${shown(v.netBits, '0.000')} bit/symbol at ${shown(v.requiredEsN0Db === null ? null : mapEstimate(v.requiredEsN0Db, db => db - (decoderGapDb ?? 0)))} dB`,
      `with the decoder gap of ${shown(decoderGapDb)} dB: ${shown(v.requiredEsN0Db)} dB`,
    ]

const errorLines = (v: CandidateValues, kind: keyof typeof errorNames, context: ColumnContext) => [
  `smallest Es/N0 with ${errorNames[kind]} ≤ ${target(context)}: ${shown(v.requiredEsN0Db)} dB`,
  ...v.crossedMoreThanOnce ? ['the error rate crosses the target more than once: the largest such Es/N0 counts, above which it stays at or below'] : [],
  ...v.errorFloor === null ? [] : [`the error rate never falls below its floor of ${shown(v.errorFloor, '0.00e-0')}`],
  `M = ${shown(v.order, 'integer')}, d_min = ${shown(v.minimumDistance, '0.000')} at Es = 1, ${shown(v.relevantMean)} relevant and ${shown(v.nearestMean)} nearest neighbours on average`,
]

const requiredLines = (v: CandidateValues, { inputs }: Candidate, context: ColumnContext) => {
  switch (v.requiredBy) {
    case 'entered': return [`entered: ${shown(v.requiredEsN0Db)} dB`, inputs.enteredSource ? `source given: ${inputs.enteredSource}` : 'no source given']
    case 'bitMetricRate':
    case 'mutualInformation': return thresholdLines(v, v.requiredBy, inputs, context)
    default: return errorLines(v, v.requiredBy, context)
  }
}

export const requiredEsN0 = valueColumn('requiredEsN0Db', '0.00', {
  id: 'requiredEsN0', method: 'requiredSnr', title: 'Required Es/N0', unit: 'dB', group, firstOpening: true, width: 19,
  meaning: 'Smallest Es/N0 above which the error rate stays at or below the study\'s target, on the row\'s basis.',
  formula: 'smallest Es/N0 with SER or BER ≤ target; or rate threshold + decoder gap; or as entered', source: 'Methods §4; exact SER by Craig 1991', tolerance,
  lines: requiredLines,
})

const difference = (row: Candidate, { reference }: ColumnContext): Estimate | null => {
  const [own, other] = [row.values?.requiredEsN0Db ?? null, reference?.values?.requiredEsN0Db ?? null]
  if (own === null || other === null) return null
  const value = valueOf(own) - valueOf(other)
  return isInterval(own) || isInterval(other) ? { value, low: lowOf(own) - highOf(other), high: highOf(own) - lowOf(other) } : value
}

export const delta = estimateColumn(difference, {
  id: 'delta', method: 'requiredSnr', title: 'Δ to reference', unit: 'dB', group, format: '+0.00', firstOpening: true, width: 19,
  meaning: 'Required Es/N0 minus that of the reference row; negative needs less.',
  formula: 'Δ = required Es/N0 − required Es/N0 of the reference', source: 'Methods §4', tolerance: tolerances.differenceDb,
  lines: (v, row, context) => context.reference
    ? [`${shown(v.requiredEsN0Db)} dB − ${shown(context.reference.values?.requiredEsN0Db)} dB (${context.reference.inputs.name}) = ${shown(difference(row, context), '+0.00')} dB`]
    : ['no row has the role of reference'],
})

export const requiredEbN0 = valueColumn('requiredEbN0Db', '0.00', {
  id: 'requiredEbN0', method: 'snrAxes', title: 'Required Eb/N0', unit: 'dB', group, firstOpening: true, width: 19,
  meaning: 'Required SNR per net bit.',
  formula: 'Eb/N0 = Es/N0 − 10·log10 R, R the net bits per symbol', source: 'Methods §0', tolerance,
  lines: v => [`${shown(v.requiredEsN0Db)} dB − 10·log10 ${shown(v.netBits, '0.000')} = ${shown(v.requiredEbN0Db)} dB`],
})

export const requiredEpkN0 = valueColumn('requiredEpkN0Db', '0.00', {
  id: 'requiredEpkN0', method: 'snrAxes', title: 'Required Epk/N0', unit: 'dB', group, width: 20,
  meaning: 'Required SNR by the energy of the outermost point.',
  formula: 'Epk/N0 = Es/N0 + PAPR', source: 'Methods §0', tolerance,
  lines: v => [`${shown(v.requiredEsN0Db)} dB + ${shown(v.paprDb)} dB = ${shown(v.requiredEpkN0Db)} dB`],
})

/** Bounds and approximation are then those of the BER. */
const isBitTarget = ({ requiredBy }: CandidateValues) => requiredBy === 'berExact'

const by = (what: string, formula: string, source: string) => ({
  unit: 'dB', group, tolerance, source, formula,
  meaning: `Smallest Es/N0 at which the ${what} meets the target.`,
})

export const requiredUnion = valueColumn('requiredUnionEsN0Db', '0.00', {
  id: 'requiredUnion', method: 'unionBound', title: 'Required Es/N0, bound', width: 26,
  ...by('union bound over relevant neighbours', 'smallest Es/N0 with Σᵢ pᵢ Σⱼ∈Nᵢ Q(dᵢⱼ/√(2·N0)) ≤ target', 'Methods §2, §4'),
  lines: (v, _row, context) => isBitTarget(v)
    ? ['a target for the BER is bounded over all pairs only']
    : [`bound ≤ ${target(context)} from ${shown(v.requiredUnionEsN0Db)} dB`],
})

export const requiredAllPairs = valueColumn('requiredAllPairsEsN0Db', '0.00', {
  id: 'requiredAllPairs', method: 'unionBound', title: 'Required Es/N0, all pairs', width: 29,
  ...by('union bound over all pairs', 'smallest Es/N0 with Σᵢ pᵢ Σⱼ≠ᵢ wᵢⱼ·Q(dᵢⱼ/√(2·N0)) ≤ target; SER: wᵢⱼ = 1, BER: wᵢⱼ = d_H(i,j)/k', 'Methods §2, §3, §4'),
  lines: (v, _row, context) => [`all-pairs bound of the ${isBitTarget(v) ? 'BER' : 'SER'} ≤ ${target(context)} from ${shown(v.requiredAllPairsEsN0Db)} dB`],
})

export const requiredNearest = valueColumn('requiredNearestEsN0Db', '0.00', {
  id: 'requiredNearest', method: 'nearestNeighbour', title: 'Required Es/N0, approximation', width: 33,
  ...by('nearest-neighbour approximation', 'smallest Es/N0 with Ā·Q(d_min/√(2·N0)) ≤ target; BER: (1/k) Σᵢ pᵢ Σⱼ∈Nᵢ d_H(i,j)·Q(dᵢⱼ/√(2·N0)) ≤ target', 'Methods §2, §3, §4'),
  lines: (v, _row, context) => [`${isBitTarget(v) ? 'approximation of the BER by relevant neighbours' : `${shown(v.nearestMean)}·Q(d_min/√(2·N0))`} ≤ ${target(context)} from ${shown(v.requiredNearestEsN0Db)} dB`],
})

export const boundPenalty = valueColumn('boundPenaltyDb', '0.00', {
  id: 'boundPenalty', method: 'boundPenalty', title: 'Bound penalty', unit: 'dB', group, firstOpening: true, width: 18,
  meaning: 'How much required SNR the union bound costs against the exact error rate.',
  formula: 'required Es/N0 by the bound − required Es/N0 exact', source: 'Methods §4', tolerance: tolerances.differenceDb,
  lines: v => [`${shown(isBitTarget(v) ? v.requiredAllPairsEsN0Db : v.requiredUnionEsN0Db)} dB − ${shown(v.requiredEsN0Db)} dB = ${shown(v.boundPenaltyDb, '0.00e-0')} dB`],
})

/** Of a rate threshold, what is required before the decoder's gap is added. */
const withoutDecoderGap = ({ requiredBy, requiredEsN0Db }: CandidateValues, { inputs: { decoderGapDb } }: Candidate) =>
  requiredEsN0Db !== null && requiredBy in rateNames ? mapEstimate(requiredEsN0Db, db => db - (decoderGapDb ?? 0)) : requiredEsN0Db

export const gapToCapacity = valueColumn('gapToCapacityDb', '0.00', {
  id: 'gapToCapacity', method: 'capacity', title: 'Gap to capacity', unit: 'dB', group, width: 20,
  meaning: 'Required Es/N0, of a rate threshold without the decoder\'s gap, minus the one at which capacity equals the net bits per symbol; none over fading.',
  formula: 'required − 10·log10((N/2)·(2^(2R/N) − 1))', source: 'Methods §5; Shannon 1948', tolerance,
  lines: (v, row) => {
    const own = withoutDecoderGap(v, row)
    const capacityDb = own === null || v.gapToCapacityDb === null ? null : valueOf(own) - valueOf(v.gapToCapacityDb)
    return [`N = ${shown(v.dimensions, 'integer')}, R = ${shown(v.netBits, '0.000')}: ${shown(own)} dB − ${shown(capacityDb)} dB = ${shown(v.gapToCapacityDb)} dB`]
  },
})

export const evm = valueColumn('evmPercent', '0.00', {
  id: 'evm', method: 'evm', title: 'EVM at required SNR', unit: '%', group, width: 22,
  meaning: 'Error vector magnitude that corresponds to the required SNR.',
  formula: 'EVM = √(N·N0/(2·Es))', source: 'Methods §1', tolerance: tolerances.evm,
  lines: v => [`N = ${shown(v.dimensions, 'integer')}, Es/N0 = ${shown(v.requiredEsN0Db)} dB: ${shown(v.evmPercent)} %`],
})

const notEntered = (basis: string) => basis === 'entered' ? null : 'Used where the basis is entered only.'

export const enteredEsN0 = numberInput('enteredEsN0Db', {
  id: 'enteredEsN0Db', title: 'Entered Es/N0', unit: 'dB', group, meaning: 'Required Es/N0 given by you, where the basis is entered.',
}, { width: 18, unused: inputs => notEntered(inputs.basis) })

export const enteredNetBits = numberInput('enteredNetBits', {
  id: 'enteredNetBits', title: 'Entered net bits', unit: 'bit/symbol', group, meaning: 'Net bits per symbol given by you, for an entered scheme.',
}, { width: 27, unused: inputs => inputs.family === 'entered' ? null : 'Used by an entered scheme only.' })

export const enteredSource = textInput('enteredSource', {
  id: 'enteredSource', title: 'Source of entered values', group, meaning: 'Where the entered values come from.',
}, { unused: inputs => notEntered(inputs.basis) })
