import { z } from 'zod'
import { id, issue } from './common'
import { estimate } from './values'

const n = z.number().nullable()
const e = estimate.nullable()

/**
 * Columns that need heavy work, by part: they are computed when somebody shows or asks for them.
 * null where a row has no such number; SNR in dB, rates in bit per symbol.
 */
export const partValues = {
  /** BER at the available Es/N0, and the Es/N0 at which the exact one meets the study's target value */
  bits: z.object({ berExact: e, berNearest: n, berAllPairs: n, requiredBerEsN0Db: e }),
  /** information rates at the available Es/N0, and the Es/N0 at which they reach the row's net bits per symbol */
  rates: z.object({ mutualInformation: e, bitMetricRate: e, thresholdMutualInformationDb: e, thresholdBitMetricDb: e }),
  /** what the points stand without noise */
  tolerances: z.object({ largestRotationDeg: n, largestGainDb: n }),
  frames: z.object({ frameErrorRate: e }),
  /** what lies below the exact SER, and the directional estimate of it */
  lower: z.object({ serLower: n, serDirectional: e }),
  /** MAP decisions at the available Es/N0; how many points lie outside of their own cells, and how many cells have vanished */
  map: z.object({ serMap: n, requiredMapEsN0Db: n, mapOutside: n, mapVanished: n }),
} as const
export type PartName = keyof typeof partValues
export const partNames = Object.keys(partValues) as PartName[]
export type PartValuesOf<P extends PartName> = z.infer<(typeof partValues)[P]>
export type PartValues = { [P in PartName]: PartValuesOf<P> }[PartName]

export const partStates = ['computing', 'computed', 'failed'] as const

const partOf = <V extends z.ZodType>(values: V) => z.object({
  state: z.enum(partStates),
  values: values.nullable(),
  /** why it failed: where, and what is allowed */
  errors: z.array(issue),
})

/** The parts of a row that have been asked for. */
export const candidateParts = z.object({
  bits: partOf(partValues.bits), rates: partOf(partValues.rates), tolerances: partOf(partValues.tolerances),
  frames: partOf(partValues.frames), lower: partOf(partValues.lower), map: partOf(partValues.map),
}).partial()
export type CandidateParts = z.infer<typeof candidateParts>

/** What is stored as a part beside the columns: curves that are drawn when they are asked for. */
export type StoredPart = PartName | 'curves-ber' | 'curves-rate'

/** POST /api/studies/{id}/parts: has a part of these rows computed where it is missing; the rows follow as events. */
export const partsRequest = z.strictObject({
  part: z.enum(partNames, { error: `A part is one of ${partNames.join(', ')}.` }),
  ids: z.array(id).min(1, 'Name at least one row.').max(10_000, 'Name at most 10,000 rows.'),
})
export type PartsRequest = z.infer<typeof partsRequest>

/** How many of the rows have the part, how many wait for it, and how many can have none, because they have failed or have no points. */
export const partsAnswer = z.object({ computed: z.int(), queued: z.int(), without: z.int() })
export type PartsAnswer = z.infer<typeof partsAnswer>
