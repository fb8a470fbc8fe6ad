import { tolerances } from '../methods/tolerances'
import type { Estimate } from '../modulation/estimate'
import type { CandidateValues } from '../schemas/values'
import { shown, valueColumn } from './make'

const group = 'Error rates' as const
const tolerance = tolerances.symbolError

const at = (v: CandidateValues, value: Estimate | null) => [
  `at the available Es/N0 of ${shown(v.availableEsN0Db)} dB: ${shown(value, '0.00e-0')}`,
]

export const serUnion = valueColumn('serUnion', '0.00e-0', {
  id: 'serUnion', method: 'unionBound', title: 'SER at available, bound', group, firstOpening: true, width: 25,
  meaning: 'Symbol error rate at the available Es/N0 by the union bound over relevant neighbours; it may exceed 1.',
  formula: 'Σᵢ pᵢ Σⱼ∈Nᵢ Q(dᵢⱼ/√(2·N0))', source: 'Methods §2', tolerance,
  lines: v => [...at(v, v.serUnion), `${shown(v.relevantMean)} relevant neighbours on average are summed`],
})

export const serNearest = valueColumn('serNearest', '0.00e-0', {
  id: 'serNearest', method: 'nearestNeighbour', title: 'SER at available, approximation', group, firstOpening: true, width: 32,
  meaning: 'Symbol error rate at the available Es/N0 by the nearest-neighbour approximation; not a bound.',
  formula: 'Ā·Q(d_min/√(2·N0))', source: 'Methods §2', tolerance,
  lines: v => [`${shown(v.nearestMean)} · Q(${shown(v.minimumDistance, '0.000')}/√(2·N0)) with Es = 1`, ...at(v, v.serNearest)],
})

export const serExact = valueColumn('serExact', '0.00e-0', {
  id: 'serExact', method: 'exactSer', title: 'SER at available, exact', group, firstOpening: true, width: 25,
  meaning: 'Symbol error rate at the available Es/N0, exact for the row\'s decisions and channel; in more dimensions an estimate with its interval where no exact way is known.',
  formula: 'Σᵢ pᵢ Σ_edges (1/2π) ∫ exp(−(h²+t²)/N0)·h/(h²+t²) dt; one dimension: sums of Q', source: 'Methods §2; Craig 1991', tolerance,
  lines: v => at(v, v.serExact),
})

export const serAllPairs = valueColumn('serAllPairs', '0.00e-0', {
  id: 'serAllPairs', method: 'unionBound', title: 'SER at available, all pairs', group, width: 28,
  meaning: 'Symbol error rate at the available Es/N0 by the union bound over all pairs, looser than over relevant neighbours.',
  formula: 'Σᵢ pᵢ Σⱼ≠ᵢ Q(dᵢⱼ/√(2·N0))', source: 'Methods §2', tolerance,
  lines: v => at(v, v.serAllPairs),
})
