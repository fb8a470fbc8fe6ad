import { z } from 'zod'
import { mustHaveKinds } from './requirements'
import type { MustHaveKind } from './requirements'

const n = z.number().nullable()

/** A number that is known within an interval only: simulated, or held between two bounds. */
export const interval = z.object({ value: z.number(), low: z.number(), high: z.number() })
/** A number, exact within its tolerance, or an interval where only that is known. */
export const estimate = z.union([z.number(), interval])
const e = estimate.nullable()

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
  availableEsN0Db: z.number(), marginDb: e, requiredMarginDb: z.number(), surplusDb: e,
})

/**
 * What a row's required SNR rests on: the exact SER or BER, the union bound where nothing better is known, a rate threshold with the
 * decoder's gap, or a value entered.
 */
export const requiredWays = ['serExact', 'serUnion', 'berExact', 'bitMetricRate', 'mutualInformation', 'entered'] as const
export type RequiredWay = (typeof requiredWays)[number]

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
  /** what the required SNR rests on */
  requiredBy: z.enum(requiredWays),
  requiredEsN0Db: e, requiredEbN0Db: e, requiredEpkN0Db: e,
  /** whether the error rate crosses the target more than once, and the rate below which it never falls, if there is one */
  crossedMoreThanOnce: z.boolean(), errorFloor: n,
  requiredUnionEsN0Db: n, requiredAllPairsEsN0Db: n, requiredNearestEsN0Db: n,
  boundPenaltyDb: e, gapToCapacityDb: e, evmPercent: e,
  /** null where it is not used and cannot be simulated */
  backOffDb: n, backOffErrorDb: n,
  symbolRateHz: z.number(), occupiedBandwidthHz: z.number(), netBitRate: z.number(), spectralEfficiency: z.number(),
  cases: z.array(caseValues),
  /** of the case that decides */
  decidingCase: z.string().nullable(),
  availableEsN0Db: z.number(), availableEbN0Db: z.number(), marginDb: e, requiredMarginDb: z.number(), surplusDb: e,
  implementationLossDb: z.number(), rollOff: z.number(),
  receiverThresholdDbm: e,
  serUnion: n, serAllPairs: n, serNearest: n, serExact: e,
  passes: z.boolean(),
  verdict: z.string(),
  checks: z.array(check),
})
export type CandidateValues = z.infer<typeof candidateValues>

const series = z.array(z.number())
const band = series.optional()

/**
 * SER of one row over its SNR range: empty where the row has no curve of that way.
 * Where only an interval is known, serExact holds the estimate and serLow and serHigh its ends.
 */
export const candidateCurves = z.object({ esN0Db: series, serUnion: series, serNearest: series, serExact: series, serLow: band, serHigh: band })
export type CandidateCurves = z.infer<typeof candidateCurves>

/** BER of one row over its SNR range: empty where the row has no curve of that way. */
export const bitErrorCurves = z.object({ esN0Db: series, berAllPairs: series, berNearest: series, berExact: series })
export type BitErrorCurves = z.infer<typeof bitErrorCurves>

/** Information rates of one row over its SNR range, bit per symbol; the bit-metric rate is empty without labels. */
export const informationCurves = z.object({
  esN0Db: series, mutualInformation: series, bitMetricRate: series,
  mutualInformationLow: band, mutualInformationHigh: band, bitMetricRateLow: band, bitMetricRateHigh: band,
})
export type InformationCurves = z.infer<typeof informationCurves>

/** GET /api/candidates/{id}/curves?quantity= */
export const curvesQuery = z.strictObject({ quantity: z.enum(['ser', 'ber', 'rate'], { error: 'The quantity is ser, ber or rate.' }).default('ser') })
export type CurveQuantity = z.infer<typeof curvesQuery>['quantity']

/**
 * GET /api/candidates/{id}/constellation: what the close-up draws, at unit mean energy. Points of more than two dimensions are drawn by their
 * first two coordinates, without cells.
 */
export const candidateConstellation = z.object({
  dimensions: z.int(),
  points: z.array(z.array(z.number())),
  /** cell of each point as a polygon, clipped to the box */
  cells: z.array(z.array(z.array(z.number()))),
  box: z.number(),
  /** `share`: part of the point's own sum in the union bound at the row's available Es/N0 that this neighbour makes; null while that is not known */
  neighbours: z.array(z.array(z.object({ point: z.int(), distance: z.number(), nearest: z.boolean(), share: n }))),
  minimumDistance: z.number(),
  /** null where the points have none */
  labels: z.array(z.string()).nullable(),
  /** null: all 1/M */
  probabilities: z.array(z.number()).nullable(),
  /** symbol error probability of each point at the available Es/N0; null where it is not known by point */
  errorByPoint: z.array(z.number()).nullable(),
  availableEsN0Db: n,
})
export type CandidateConstellation = z.infer<typeof candidateConstellation>
