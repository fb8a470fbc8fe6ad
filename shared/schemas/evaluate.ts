import { z } from 'zod'
import { factorFamilies, lattices } from './candidates'
import { numberBetween, wholeBetween } from './common'
import { estimate } from './values'
import { families } from '../modulation'
import type { FamilyParameter } from '../modulation'

export const limits = { order: 4096, dimensions: 8, snrValues: 1001 } as const

const coordinate = z.number({ error: 'A coordinate is a finite number.' })

const parameters: readonly FamilyParameter[] = ['order', 'rings', 'ratios', 'phases', 'points', 'lattice', 'offset', 'factors']
const list = new Intl.ListFormat('en-GB')

/** What is wrong with naming a parameter that another family takes. */
function foreignSentence(family: (typeof families)[number], parameter: FamilyParameter): string {
  const takers = families.filter(other => other.parameters.includes(parameter)).map(other => other.id)
  return `${family.title} takes its ${list.format(family.parameters)}; ${parameter} ${parameter === 'order' ? 'is' : 'are'} for the ${takers.length > 1 ? 'families' : 'family'} ${list.format(takers)}.`
}

const shape = {
  order: wholeBetween(2, limits.order, 'Order M is a whole number from 2 to 4096.').optional(),
  rings: z.array(wholeBetween(1, limits.order, 'A ring has 1 to 4096 points.')).min(1, 'Send at least one ring.').max(64, 'At most 64 rings.').optional(),
  ratios: z.array(numberBetween(1e-3, 1e3, 'A ring ratio is a number from 0.001 to 1,000.')).max(63, 'At most 63 ring ratios.').optional(),
  /** radians */
  phases: z.array(numberBetween(-10, 10, 'A ring phase is in radians, from −10 to 10.')).max(64, 'At most 64 ring phases.').optional(),
  lattice: z.enum(lattices, { error: 'A lattice is A2, D4 or E8.' }).optional(),
  /** centre of a lattice cut, in minimum distances */
  offset: z.array(numberBetween(-1e3, 1e3, 'An offset is of numbers from −1,000 to 1,000, in minimum distances.')).max(limits.dimensions, 'An offset has at most 8 coordinates.').optional(),
}

/** Constellation of an evaluation: points as given, or a family at unit mean energy. */
export const evaluatedConstellation = z.strictObject({
  family: z.enum(families.map(f => f.id) as [string, ...string[]], { error: `The family is one of ${families.map(f => f.id).join(', ')}.` }),
  ...shape,
  factors: z.array(z.strictObject({
    family: z.enum(factorFamilies, { error: 'A factor is a family of the list other than a product or points of your own.' }), ...shape,
  })).min(2, 'A product has 2 to 8 factors.').max(8, 'A product has 2 to 8 factors.').optional(),
  points: z.array(z.array(coordinate).min(1, 'A point has 1 to 8 coordinates.').max(limits.dimensions, 'A point has 1 to 8 coordinates.'))
    .min(2, 'Send 2 to 4096 points.').max(limits.order, 'Send 2 to 4096 points.').optional(),
  labels: z.array(z.string({ error: 'A label is a word of 1 to 12 bits such as 0110.' }).regex(/^[01]{1,12}$/, 'A label is a word of 1 to 12 bits such as 0110.')).max(limits.order, 'Send a label for each point, at most 4096.').optional(),
  probabilities: z.array(numberBetween(0, 1, 'A probability is from 0 to 1.')).max(limits.order, 'Send a probability for each point, at most 4096.').optional(),
}).superRefine((constellation, refine) => {
  const family = families.find(({ id }) => id === constellation.family)!
  for (const parameter of parameters) {
    if (constellation[parameter] === undefined || family.parameters.includes(parameter)) continue
    refine.addIssue({ code: 'custom', path: [parameter], message: foreignSentence(family, parameter) })
  }
})

export const evaluationQuantities = [
  'serUnion', 'serAllPairs', 'serNearest', 'serExact', 'berAllPairs', 'berNearest', 'berExact', 'mutualInformation', 'bitMetricRate',
] as const
export type EvaluationQuantity = (typeof evaluationQuantities)[number]

/** What the required Es/N0 is found for: an error rate, or an information rate in bit per symbol. */
const target = z.strictObject({
  quantity: z.enum(['ser', 'ber', 'rate'], { error: 'The target is a symbol error rate (ser), a bit error rate (ber) or an information rate (rate).' }),
  value: z.number({ error: 'Enter the target\'s value as a number.' }),
}).superRefine(({ quantity, value }, refine) => {
  const [low, high] = quantity === 'rate' ? [1e-6, 12] : [1e-15, 0.5]
  if (value >= low && value <= high) return
  const message = quantity === 'rate' ? 'Enter a target rate from 1e-6 to 12 bit per symbol.' : `Enter a target ${quantity.toUpperCase()} from 1e-15 to 0.5.`
  refine.addIssue({ code: 'custom', path: ['value'], message })
})

/** POST /api/evaluate */
export const evaluation = z.strictObject({
  constellation: evaluatedConstellation,
  esN0Db: z.array(numberBetween(-60, 120, 'An Es/N0 value is from −60 to 120 dB.'))
    .min(1, 'Send 1 to 1,001 values of Es/N0.').max(limits.snrValues, 'Send 1 to 1,001 values of Es/N0.'),
  target: target.optional(),
  quantities: z.array(z.enum(evaluationQuantities, {
    error: ({ input }) => `The quantity ${String(input).slice(0, 40)} is not offered: a quantity is one of ${evaluationQuantities.join(', ')}.`,
  })).min(1, 'Name at least one quantity, or leave quantities out.').max(16, 'Name at most 16 quantities.')
    .default(['serUnion', 'serNearest', 'serExact']),
})
export type EvaluationRequest = z.infer<typeof evaluation>

const numbers = z.array(z.number())
const estimates = z.array(estimate)
export const evaluationAnswer = z.object({
  order: z.int(), dimensions: z.int(), bitsPerSymbol: z.number(), meanEnergy: z.number(), peakEnergy: z.number(), paprDb: z.number(),
  minimumDistance: z.number(),
  neighbours: z.object({ relevantMean: z.number(), nearestMean: z.number(), relevant: z.array(z.array(z.int())) }),
  curves: z.object({
    esN0Db: numbers,
    serUnion: numbers.optional(), serAllPairs: numbers.optional(), serNearest: numbers.optional(), serExact: estimates.optional(),
    berAllPairs: numbers.optional(), berNearest: numbers.optional(), berExact: numbers.optional(),
    mutualInformation: estimates.optional(), bitMetricRate: estimates.optional(),
  }),
  requiredEsN0Db: z.partialRecord(z.enum(evaluationQuantities), estimate).optional(),
})
