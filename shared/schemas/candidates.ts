import { z } from 'zod'
import { id, issue, name, numberBetween, text, wholeBetween } from './common'
import { candidateValues } from './values'
import { families } from '../modulation'

/** A row's family: one of the core's, or entered for a scheme outside the model. */
export const familyIds = [...families.map(f => f.id), 'entered'] as const
export type CandidateFamily = (typeof familyIds)[number]

export const bases = ['uncoded', 'entered'] as const
export const normalisations = ['meanEnergy', 'peakEnergy', 'minimumDistance'] as const
export const backOffs = ['simulated', 'entered', 'papr'] as const
export const roles = ['reference', 'chosen', 'fallback', 'rejected'] as const

const snrDb = (what: string) => numberBetween(-60, 120, `Enter ${what} of the SNR range from −60 to 120 dB.`)
const ratio = numberBetween(1e-3, 1e3, 'A ring ratio is a number from 0.001 to 1,000.')
const coordinate = numberBetween(-1e9, 1e9, 'A coordinate is a number from −1e9 to 1e9.')

/**
 * Inputs of a candidate: what the reader enters in one row.
 * Fields of other families stay as they are and are not used, so that a change of family loses nothing.
 */
export const candidateInputs = z.strictObject({
  name: name('the candidate\'s name'),
  family: z.enum(familyIds, { error: 'Choose a family of the list.' }),
  /** number of points M */
  order: wholeBetween(2, 4096, 'Order M is a whole number from 2 to 4096.').nullable(),
  /** APSK: points on each ring, the innermost first */
  rings: z.array(wholeBetween(1, 4096, 'A ring has 1 to 4096 points.')).min(1, 'Enter at least one ring.').max(64, 'At most 64 rings.').nullable(),
  /** APSK: radius of each further ring over that of the first ring of more than one point */
  ratios: z.array(ratio).max(63, 'At most 63 ring ratios.').nullable(),
  /** APSK: phase of each ring's first point in degrees; null: π/n */
  phasesDeg: z.array(numberBetween(-360, 360, 'A ring phase is from −360° to 360°.')).max(64, 'At most 64 ring phases.').nullable(),
  /** custom: M points of N coordinates in signal units */
  points: z.array(z.array(coordinate).min(1, 'A point has 1 or 2 coordinates.').max(8, 'A point has at most 8 coordinates.'))
    .min(2, 'Enter 2 to 4096 points.').max(4096, 'Enter 2 to 4096 points.').nullable(),
  normalisation: z.enum(normalisations, { error: 'Normalise to mean energy, peak energy or minimum distance.' }),
  /** minimum distance in signal units, where that is the normalisation */
  spacing: numberBetween(1e-9, 1e9, 'Spacing is a distance from 1e-9 to 1e9 signal units.').nullable(),
  basis: z.enum(bases, { error: 'The basis is uncoded or entered.' }),
  codeRate: numberBetween(1e-6, 1, 'A code rate is above 0 and up to 1.'),
  enteredEsN0Db: numberBetween(-60, 120, 'Enter a required Es/N0 from −60 to 120 dB.').nullable(),
  enteredNetBits: numberBetween(1e-6, 64, 'Enter net bits per symbol above 0 and up to 64.').nullable(),
  enteredSource: text(300),
  snrStart: snrDb('the start'),
  snrStop: snrDb('the stop'),
  snrStep: numberBetween(1e-3, 120, 'The step of the SNR range is from 0.001 to 120 dB.'),
  /** null: the study's */
  rollOff: numberBetween(0, 1, 'Enter a roll-off from 0 to 1.').nullable(),
  backOff: z.enum(backOffs, { error: 'Back-off is simulated, entered, or the constellation\'s PAPR alone.' }),
  backOffDb: numberBetween(0, 60, 'Enter a back-off from 0 to 60 dB.').nullable(),
  /** probability with which the simulated back-off may be exceeded */
  backOffExceedance: numberBetween(1e-4, 0.1, 'Exceedance probability is from 1e-4 to 0.1.'),
  /** null: the study's */
  implementationLossDb: numberBetween(0, 100, 'Enter an implementation loss from 0 to 100 dB.').nullable(),
  role: z.enum(roles, { error: 'A role is reference, chosen, fallback or rejected.' }).nullable(),
  roleReason: text(1000),
  note: text(2000),
})
export type CandidateInputs = z.infer<typeof candidateInputs>
export type CandidateField = keyof CandidateInputs

/** What a new row starts with. */
export const defaultInputs: CandidateInputs = {
  name: '16-QAM', family: 'qam', order: 16, rings: null, ratios: null, phasesDeg: null, points: null,
  normalisation: 'meanEnergy', spacing: null, basis: 'uncoded', codeRate: 1,
  enteredEsN0Db: null, enteredNetBits: null, enteredSource: '',
  snrStart: 0, snrStop: 40, snrStep: 1, rollOff: null, backOff: 'simulated', backOffDb: null, backOffExceedance: 1e-3,
  implementationLossDb: null, role: null, roleReason: '', note: '',
}

/** One new row: some or all of the inputs; what is left out takes its default, the name is made from the family. */
export const candidateCreation = candidateInputs.partial()

/** POST /api/studies/{id}/candidates: one row, or many in `items`; `after` places them behind that row. */
const manyCreation = z.strictObject({
  items: z.array(candidateCreation, { error: 'Send a list of rows.' }).min(1, 'Send at least one row.').max(2000, 'Send at most 2,000 rows at a time.'),
  after: id.nullable().optional(),
})
export const candidatesCreation = z.union([manyCreation, candidateCreation])
export type CandidatesCreation = z.infer<typeof candidatesCreation>

/** Which of the two is meant: a union would tell a mistake in `items` as if the field did not exist. */
export const candidatesCreationOf = (body: unknown): z.ZodType<CandidatesCreation> =>
  typeof body === 'object' && body !== null && 'items' in body ? manyCreation : candidateCreation

/** PATCH /api/candidates/{id} */
export const candidateChange = candidateInputs.partial()
export type CandidateChange = z.infer<typeof candidateChange>

const ids = z.array(id).min(1, 'Name at least one row.').max(10_000, 'Name at most 10,000 rows.')
/** POST /api/studies/{id}/candidates/delete, …/restore, …/duplicate */
export const candidateSelection = z.strictObject({ ids })
/** POST /api/studies/{id}/candidates/move: puts the rows, in the order given, behind `after` (null: first). */
export const candidateMove = z.strictObject({ ids, after: id.nullable() })
/** PUT /api/studies/{id}/pins: the pinned rows' slots on the overlay, 1 to 12. */
export const pinChange = z.strictObject({ candidate: id, pinned: z.boolean({ error: 'Pinned is true or false.' }) })

export const candidateStates = ['computing', 'computed', 'failed'] as const

/** One row of the grid as the server sends it. */
export const candidate = z.object({
  id, studyId: id, version: z.int(), position: z.number(),
  /** slot on the overlay, 1 to 12: it fixes colour, dash and marker */
  pin: z.int().nullable(),
  sweepId: id.nullable(),
  createdAt: z.string(), updatedAt: z.string(),
  inputs: candidateInputs,
  state: z.enum(candidateStates),
  /** why the row failed: where, and what is allowed */
  errors: z.array(issue),
  values: candidateValues.nullable(),
})
export type Candidate = z.infer<typeof candidate>
