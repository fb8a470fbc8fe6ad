import { z } from 'zod'
import { mustHaveKinds } from './requirements'
import type { MustHaveKind } from './requirements'

const n = z.number().nullable()

/** A must-have judged on unrounded numbers. */
export const check = z.object({
  id: z.string(), kind: z.enum(Object.keys(mustHaveKinds) as MustHaveKind[]),
  passes: z.boolean(),
  /** by how much it holds (positive) or fails (negative), in the kind's unit; null where the row has no such number */
  by: n,
  sentence: z.string(),
})

/** One link case of a row, in dB. */
export const caseValues = z.object({
  id: z.string(), name: z.string(),
  availableEsN0Db: z.number(), marginDb: n, requiredMarginDb: z.number(), surplusDb: n,
})

/**
 * Computed cells of a row. SNR in dB, rates in Hz and bit/s, probabilities plain.
 * null where a row has no such number (an entered scheme has no geometry).
 */
export const candidateValues = z.object({
  order: z.int().nullable(), dimensions: z.int().nullable(), bitsPerSymbol: n, netBits: z.number(),
  meanEnergy: n, peakEnergy: n, paprDb: n,
  /** at Es = 1 */
  minimumDistance: n,
  /** in signal units after the row's normalisation */
  spacing: n,
  nearestMean: n, relevantMean: n, asymptoticEfficiencyDb: n,
  requiredEsN0Db: n, requiredEbN0Db: n, requiredEpkN0Db: n,
  requiredUnionEsN0Db: n, requiredAllPairsEsN0Db: n, requiredNearestEsN0Db: n,
  boundPenaltyDb: n, gapToCapacityDb: n, evmPercent: n,
  backOffDb: z.number(), backOffErrorDb: n,
  symbolRateHz: z.number(), occupiedBandwidthHz: z.number(), netBitRate: z.number(), spectralEfficiency: z.number(),
  cases: z.array(caseValues),
  /** of the case that decides */
  decidingCase: z.string().nullable(),
  availableEsN0Db: z.number(), availableEbN0Db: z.number(), marginDb: n, requiredMarginDb: z.number(), surplusDb: n,
  implementationLossDb: z.number(), rollOff: z.number(),
  receiverThresholdDbm: n,
  serUnion: n, serAllPairs: n, serNearest: n, serExact: n,
  passes: z.boolean(),
  verdict: z.string(),
  checks: z.array(check),
})
export type CandidateValues = z.infer<typeof candidateValues>

/** GET /api/candidates/{id}/curves: SER of one row over its SNR range. */
export const candidateCurves = z.object({
  esN0Db: z.array(z.number()),
  serUnion: z.array(z.number()), serNearest: z.array(z.number()), serExact: z.array(z.number()),
})
export type CandidateCurves = z.infer<typeof candidateCurves>

/** GET /api/candidates/{id}/constellation: what the close-up draws, at unit mean energy. */
export const candidateConstellation = z.object({
  points: z.array(z.array(z.number())),
  /** cell of each point as a polygon, clipped to the box */
  cells: z.array(z.array(z.array(z.number()))),
  box: z.number(),
  neighbours: z.array(z.array(z.object({ point: z.int(), distance: z.number(), nearest: z.boolean() }))),
  minimumDistance: z.number(),
})
export type CandidateConstellation = z.infer<typeof candidateConstellation>
