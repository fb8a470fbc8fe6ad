import { z } from 'zod'
import { candidateChange } from './candidates'
import { id, numberBetween } from './common'

/**
 * Fields that a sweep can vary; `ratios.n` is the n-th ring ratio, counted from 0. `preset` is a published APSK ring set
 * by its title, such as "16-APSK 9/10", and sets all of presetFields.
 */
export const sweepFields = [
  'family', 'order', 'preset', 'rings', 'ratios.0', 'ratios.1', 'ratios.2', 'normalisation', 'spacing', 'rollOff', 'backOff', 'backOffDb', 'implementationLossDb',
  'codeRate', 'decoderGapDb', 'shapedEntropy', 'branches', 'phaseErrorDeg',
] as const
export type SweepField = (typeof sweepFields)[number]
/** What a preset sets, so that it is not varied beside one. */
export const presetFields: readonly SweepField[] = ['family', 'order', 'rings', 'ratios.0', 'ratios.1', 'ratios.2']

const value = z.union([
  z.number(), z.string().max(40, 'A word has at most 40 characters.'),
  z.array(z.number()).max(64, 'At most 64 numbers in one value.'),
], { error: 'A value is a number, a word or a list of numbers.' })

/** One parameter and the values that it takes: a list, or a range of at most 1,001 values. */
export const sweepAxis = z.union([
  z.strictObject({
    field: z.enum(sweepFields, { error: 'Choose a parameter of the list.' }),
    values: z.array(value).min(1, 'Enter at least one value.').max(1001, 'A list has at most 1,001 values.'),
  }),
  z.strictObject({
    field: z.enum(sweepFields, { error: 'Choose a parameter of the list.' }),
    start: numberBetween(-1e6, 1e6, 'The start is a number from −1e6 to 1e6.'),
    stop: numberBetween(-1e6, 1e6, 'The stop is a number from −1e6 to 1e6.'),
    step: numberBetween(1e-6, 1e6, 'The step is a number above 0.'),
  }),
])
export type SweepAxis = z.infer<typeof sweepAxis>

/** POST /api/studies/{id}/sweeps: base inputs and the axes that are multiplied out, at most 10,000 rows. */
export const sweepCreation = z.strictObject({
  base: candidateChange,
  axes: z.array(sweepAxis).min(1, 'Vary at least one parameter.').max(6, 'Vary at most 6 parameters.')
    .refine(axes => new Set(axes.map(a => a.field)).size === axes.length, 'Each parameter is varied once.')
    .refine(axes => !axes.some(a => a.field === 'preset') || !axes.some(a => presetFields.includes(a.field)), 'A preset sets family, order, rings and ratios: do not vary these beside it.'),
})
export type SweepCreation = z.infer<typeof sweepCreation>

export const sweep = z.object({
  id, studyId: id, state: z.enum(['running', 'done', 'cancelled', 'failed']),
  /** rows that it makes; rows made so far; rows computed or failed so far */
  total: z.int(), made: z.int(), computed: z.int(),
  createdAt: z.string(), createdBy: z.string(), finishedAt: z.string().nullable(),
})
export type Sweep = z.infer<typeof sweep>

/** Answer of POST /api/studies/{id}/sweeps: with the combinations that make no row, and why the first of them does not. */
export const startedSweep = sweep.extend({ leftOut: z.object({ count: z.int(), reason: z.string().nullable() }) })
export type StartedSweep = z.infer<typeof startedSweep>

/** DELETE /api/sweeps/{id}: rows that had not been computed are removed, the others stay. */
export const sweepCancellation = sweep.extend({ removed: z.int(), kept: z.int() })
export type SweepCancellation = z.infer<typeof sweepCancellation>
