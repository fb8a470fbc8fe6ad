import { z } from 'zod'
import { id, wholeBetween } from './common'

/** What a search looks for: labels of a lower bit error rate, or parameters that need a lower SNR. */
export const searchKinds = ['labels', 'parameters'] as const
export const searchStates = ['queued', 'running', 'done', 'cancelled', 'failed'] as const

/** Parameters that a search may vary, and what it lowers the required SNR of. */
export const freeParameters = ['ratios', 'phases', 'offset', 'points'] as const
export const searchGoals = ['ser', 'ber', 'mutualInformation', 'bitMetricRate'] as const

const seed = wholeBetween(0, 2 ** 31 - 1, 'A seed is a whole number from 0 to 2,147,483,647.').default(1)
const bounds = z.tuple([z.number({ error: 'A bound is a number.' }), z.number({ error: 'A bound is a number.' })], { error: 'Bounds are two numbers, the lower first.' })
  .refine(([low, high]) => low < high, 'Bounds are two numbers, the lower first.')

const labelSearch = z.strictObject({
  kind: z.literal('labels'),
  seed,
  /** labellings from which the search starts */
  starts: wholeBetween(1, 1000, 'Enter 1 to 1,000 starts.').default(20),
})

const parameterSearch = z.strictObject({
  kind: z.literal('parameters'),
  free: z.array(z.enum(freeParameters, { error: `What is searched is one of ${freeParameters.join(', ')}.` })).min(1, 'Choose at least one parameter to search.')
    .refine(free => new Set(free).size === free.length, 'Name each parameter once.'),
  /** least and largest value of a parameter's numbers; phases in degrees */
  bounds: z.partialRecord(z.enum(freeParameters), bounds).default({}),
  /** left out: what the row's required SNR rests on */
  goal: z.enum(searchGoals, { error: `The goal is one of ${searchGoals.join(', ')}.` }).optional(),
  seed,
  starts: wholeBetween(2, 100, 'Enter 2 to 100 starts.').default(4),
  /** evaluations of the goal at most; left out: by the number of parameters */
  budget: wholeBetween(1, 200_000, 'Enter 1 to 200,000 evaluations.').optional(),
})

/** POST /api/candidates/{id}/searches */
export const searchCreation = z.discriminatedUnion('kind', [labelSearch, parameterSearch], { error: 'A search is for labels or for parameters.' })
export type SearchCreation = z.infer<typeof searchCreation>

/** How far a search is, and what it has found so far. */
export const searchProgress = z.object({
  /** what is lowered, such as "BER at 12.3 dB", and its unit: null for a rate */
  what: z.string(), unit: z.string().nullable(),
  startValue: z.number(), value: z.number(),
  evaluations: z.int(), startsDone: z.int(), starts: z.int(),
  /** evaluations that it stops at; null without such a limit */
  budget: z.int().nullable(),
  /** whether it came to an end by itself, and, of parameters, on one place; where not, the goal lay between these in the last steps */
  converged: z.boolean(), low: z.number().nullable(), high: z.number().nullable(),
})
export type SearchProgress = z.infer<typeof searchProgress>

/** A search of a study. */
export const search = z.object({
  id, studyId: id, candidateId: id,
  kind: z.enum(searchKinds), state: z.enum(searchStates),
  definition: searchCreation,
  /** null until the first step is done */
  progress: searchProgress.nullable(),
  /** why it failed */
  error: z.string().nullable(),
  /** the row that it has made */
  resultId: id.nullable(),
  createdBy: z.string(), createdAt: z.string(), updatedAt: z.string(),
})
export type Search = z.infer<typeof search>
