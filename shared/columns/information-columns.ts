import { tolerances } from '../methods/tolerances'
import type { Estimate } from '../modulation/estimate'
import type { CandidateValues } from '../schemas/values'
import { shown } from './make'
import { partColumn } from './part-column'

const group = 'Information rates' as const
const rateText = (row: CandidateValues, value: Estimate | null) => [
  `at the available Es/N0 of ${shown(row.availableEsN0Db)} dB: ${shown(value, '0.000')} bit/symbol`,
  `beside net bits R = ${shown(row.netBits, '0.000')} bit/symbol`,
]

export const mutualInformation = partColumn('rates', 'mutualInformation', {
  id: 'mutualInformation', method: 'informationRates', title: 'Mutual information at available', unit: 'bit/symbol', group, format: '0.000', round: 'down', width: 32,
  meaning: 'Mutual information of the points and the received vector at the available Es/N0.',
  formula: 'I(X;Y) = h(Y) − (N/2)·log2(πe·N0)', source: 'Methods §5', tolerance: tolerances.rate,
  lines: (v, row) => rateText(row, v.mutualInformation),
})

export const bitMetricRate = partColumn('rates', 'bitMetricRate', {
  id: 'bitMetricRate', method: 'informationRates', title: 'Bit-metric rate at available', unit: 'bit/symbol', group, format: '0.000', round: 'down', width: 30,
  meaning: 'Rate that a bit-wise decoder can reach with the row\'s labels at the available Es/N0.',
  formula: '[H − Σ_b H(B_b|Y)]⁺', source: 'Methods §5; Caire, Taricco, Biglieri 1998; Böcherer 2015', tolerance: tolerances.rate,
  lines: (v, row) => rateText(row, v.bitMetricRate),
})

const thresholdText = (row: CandidateValues, value: Estimate | null) =>
  [`the rate reaches R = ${shown(row.netBits, '0.000')} bit/symbol at ${shown(value, '0.00')} dB`]

export const thresholdMutualInformation = partColumn('rates', 'thresholdMutualInformationDb', {
  id: 'thresholdMutualInformation', method: 'rateThreshold', title: 'Threshold of the mutual information', unit: 'dB', group, format: '0.00', width: 36,
  meaning: 'Es/N0 at which the mutual information reaches the row\'s net bits per symbol; there is none at code rate 1.',
  formula: 'smallest Es/N0 with I(X;Y) ≥ R', source: 'Methods §5', tolerance: tolerances.thresholdDb,
  lines: (v, row) => thresholdText(row, v.thresholdMutualInformationDb),
})

export const thresholdBitMetric = partColumn('rates', 'thresholdBitMetricDb', {
  id: 'thresholdBitMetric', method: 'rateThreshold', title: 'Threshold of the bit-metric rate', unit: 'dB', group, format: '0.00', width: 34,
  meaning: 'Es/N0 at which the bit-metric rate of the row\'s labels reaches its net bits per symbol; there is none at code rate 1.',
  formula: 'smallest Es/N0 with bit-metric rate ≥ R', source: 'Methods §5', tolerance: tolerances.thresholdDb,
  lines: (v, row) => thresholdText(row, v.thresholdBitMetricDb),
})
