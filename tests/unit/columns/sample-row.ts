import type { Candidate, CandidateInputs } from '../../../shared/schemas/candidates'
import { defaultInputs } from '../../../shared/schemas/candidates'
import type { CandidateParts } from '../../../shared/schemas/parts'
import type { CandidateValues } from '../../../shared/schemas/values'

const values: CandidateValues = {
  order: 16, dimensions: 2, bitsPerSymbol: 4, netBits: 4, meanEnergy: 1, peakEnergy: 1.8, paprDb: 2.55, minimumDistance: 0.632, spacing: 0.632,
  nearestMean: 3, relevantMean: 3, asymptoticEfficiencyDb: -3.98,
  requiredBy: 'serExact', requiredEsN0Db: 20.92, crossedMoreThanOnce: false, errorFloor: null, requiredEbN0Db: 14.9, requiredEpkN0Db: 23.47,
  requiredUnionEsN0Db: 20.921, requiredAllPairsEsN0Db: 20.922, requiredNearestEsN0Db: 20.92,
  boundPenaltyDb: 0.001, gapToCapacityDb: 9.16, evmPercent: 8.99, backOffDb: 5.47, backOffErrorDb: 0.01,
  symbolRateHz: 5.6e6, occupiedBandwidthHz: 7e6, netBitRate: 21.28e6, spectralEfficiency: 3.04,
  cases: [{ id: 'faded', name: 'faded', availableEsN0Db: 23.28, marginDb: 0.86, requiredMarginDb: 1, surplusDb: -0.14 }],
  decidingCase: 'faded', availableEsN0Db: 23.28, availableEbN0Db: 17.26, marginDb: 0.86, requiredMarginDb: 1, surplusDb: -0.14,
  implementationLossDb: 1.5, rollOff: 0.25, receiverThresholdDbm: -79.1,
  serUnion: 1e-9, serAllPairs: 1e-9, serNearest: 1e-9, serExact: 1e-9,
  passes: false, verdict: 'fails R1: margin 0.14 dB short at +0.86 dB (faded)',
  checks: [{ id: 'R1', kind: 'margin', passes: false, by: -0.14, sentence: 'margin 0.14 dB short at +0.86 dB (faded)' }],
}

const computed = { state: 'computed' as const, errors: [] }
const parts: CandidateParts = {
  bits: { ...computed, values: { berExact: 2.5e-10, berNearest: 2.5e-10, berAllPairs: 2.6e-10, requiredBerEsN0Db: 20.4 } },
  rates: { ...computed, values: { mutualInformation: 3.99, bitMetricRate: 3.98, thresholdMutualInformationDb: null, thresholdBitMetricDb: null } },
  tolerances: { ...computed, values: { largestRotationDeg: 16.87, largestGainDb: 3.52 } },
  frames: { ...computed, values: { frameErrorRate: 1e-6 } },
  lower: { ...computed, values: { serLower: 9e-10, serDirectional: { value: 1e-9, low: 9.8e-10, high: 1.02e-9 } } },
  map: { ...computed, values: { serMap: 1e-9, requiredMapEsN0Db: 20.92, mapOutside: 0, mapVanished: 0 } },
}

/** A computed row of 16-QAM with some values and inputs replaced; numbers of the demonstration study, rounded. */
export function sampleRow(replaced: Partial<CandidateValues>, inputs: Partial<CandidateInputs> = {}): Candidate {
  return {
    id: '0190f0f0-0000-7000-8000-000000000001', studyId: '0190f0f0-0000-7000-8000-000000000000', version: 1, position: 1,
    pin: null, sweepId: null, createdAt: '2026-01-01T00:00:00.000Z', updatedAt: '2026-01-01T00:00:00.000Z',
    inputs: { ...defaultInputs, ...inputs }, state: 'computed', errors: [], values: { ...values, ...replaced }, parts,
  }
}
