import { tolerances } from '../methods/tolerances'
import type { Estimate } from '../modulation/estimate'
import type { CandidateValues } from '../schemas/values'
import { shown } from './make'
import { partColumn } from './part-column'

const group = 'Error rates' as const
const tolerance = tolerances.bitError
const at = (row: CandidateValues, value: Estimate | null) =>
  `at the available Es/N0 of ${shown(row.availableEsN0Db)} dB, k = ${shown(row.bitsPerSymbol, '0.000')}: ${shown(value, '0.00e-0')}`

export const berExact = partColumn('bits', 'berExact', {
  id: 'berExact', method: 'exactBer', title: 'BER at available, exact', group, format: '0.00e-0', width: 25,
  meaning: 'Bit error rate at the available Es/N0, exact for the row\'s labels.',
  formula: '−(1/k) Σᵢ pᵢ Σ_edges(a|b) [d_H(i,a) − d_H(i,b)]·Iᵢ(edge)', source: 'Methods §3; Szczecinski et al. 2003', tolerance,
  lines: (v, row) => [at(row, v.berExact)],
})

export const berNearest = partColumn('bits', 'berNearest', {
  id: 'berNearest', method: 'berBounds', title: 'BER at available, approximation', group, format: '0.00e-0', width: 32,
  meaning: 'Bit error rate at the available Es/N0 by relevant neighbours, each with its share of wrong bits; not a bound.',
  formula: '(1/k) Σᵢ pᵢ Σⱼ∈Nᵢ d_H(i,j)·Q(dᵢⱼ/√(2·N0))', source: 'Methods §3', tolerance,
  lines: (v, row) => [at(row, v.berNearest), `${shown(row.relevantMean)} relevant neighbours on average are summed`],
})

export const berAllPairs = partColumn('bits', 'berAllPairs', {
  id: 'berAllPairs', method: 'berBounds', title: 'BER at available, bound', group, format: '0.00e-0', width: 25,
  meaning: 'Bit error rate at the available Es/N0 by the union bound over all pairs.',
  formula: '(1/k) Σᵢ pᵢ Σⱼ≠ᵢ d_H(i,j)·Q(dᵢⱼ/√(2·N0))', source: 'Methods §3; Caire, Taricco, Biglieri 1998', tolerance,
  lines: (v, row) => [at(row, v.berAllPairs)],
})

export const requiredBer = partColumn('bits', 'requiredBerEsN0Db', {
  id: 'requiredBer', method: 'requiredSnr', title: 'Required Es/N0 on BER', unit: 'dB', group: 'Required SNR', format: '0.00', width: 24,
  meaning: 'Smallest Es/N0 above which the exact bit error rate stays at or below the study\'s target value.',
  formula: 'smallest Es/N0 with BER(Es/N0) ≤ target', source: 'Methods §3, §4', tolerance: tolerances.requiredDb,
  lines: (v, row, _candidate, { requirements }) => [
    `smallest Es/N0 with exact BER ≤ ${shown(requirements?.target.value, '0.00e-0')}: ${shown(v.requiredBerEsN0Db)} dB`,
    `beside ${shown(row.requiredEsN0Db)} dB, on which the row's verdict rests`,
  ],
})

export const frameErrorRate = partColumn('frames', 'frameErrorRate', {
  id: 'frameErrorRate', method: 'frameError', title: 'Frame error rate at available', group, format: '0.00e-0', width: 30,
  meaning: 'Probability that a frame of uncoded symbols holds at least one wrong one.',
  formula: '1 − (1 − SER)^n, n the frame length', source: 'Methods §6', tolerance: tolerances.symbolError,
  lines: (v, row, { inputs }) => [`1 − (1 − ${shown(row.serExact, '0.00e-0')})^${shown(inputs.frameSymbols, 'integer')} = ${shown(v.frameErrorRate, '0.00e-0')}`],
})

export const serLower = partColumn('lower', 'serLower', {
  id: 'serLower', method: 'lowerBound', title: 'SER at available, lower bound', group, format: '0.00e-0', width: 30,
  meaning: 'Lower bound of the symbol error rate at the available Es/N0, for any number of dimensions.',
  formula: 'Σᵢ pᵢ Σⱼ∈Nᵢ Qⱼ² / Σₖ∈Nᵢ P(Aⱼ∩Aₖ)', source: 'Methods §2; Séguin 1998', tolerance: tolerances.symbolError,
  lines: (v, row) => [`at the available Es/N0 of ${shown(row.availableEsN0Db)} dB: ${shown(v.serLower, '0.00e-0')}`, `beside the bound from above, ${shown(row.serUnion, '0.00e-0')}`],
})

export const serDirectional = partColumn('lower', 'serDirectional', {
  id: 'serDirectional', method: 'directional', title: 'SER at available, directional', group, format: '0.00e-0', width: 30,
  meaning: 'Directional estimate of the symbol error rate at the available Es/N0, with its interval, cut to the two bounds.',
  formula: 'mean over directions u of Γ(N/2, ρ(u)²/N0)/Γ(N/2), ρ the distance to the boundary of the decision region',
  source: 'Methods §2', tolerance: tolerances.interval,
  lines: (v, row) => [`at the available Es/N0 of ${shown(row.availableEsN0Db)} dB: ${shown(v.serDirectional, '0.00e-0')}`, `between ${shown(v.serLower, '0.00e-0')} and ${shown(row.serUnion, '0.00e-0')}`],
})
