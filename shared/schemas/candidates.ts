import { z } from 'zod'
import { id, issue, name, numberBetween, text, wholeBetween } from './common'
import { candidateParts } from './parts'
import { candidateValues } from './values'
import { families } from '../modulation'

/** A row's family: one of the core's, or entered for a scheme outside the model. */
export const familyIds = [...families.map(f => f.id), 'entered'] as const
export type CandidateFamily = (typeof familyIds)[number]

export const bases = ['uncoded', 'rateThreshold', 'entered'] as const
/** What a rate threshold is counted with. */
export const rateKinds = ['bitMetricRate', 'mutualInformation'] as const
export const labellings = ['family', 'natural', 'own'] as const
export const probabilityRules = ['equal', 'shaped', 'own'] as const
export const decisions = ['minimumDistance', 'map'] as const
export const channels = ['awgn', 'rayleigh', 'rician', 'nakagami'] as const
export const lattices = ['A2', 'D4', 'E8'] as const
export const normalisations = ['meanEnergy', 'peakEnergy', 'minimumDistance'] as const
export const backOffs = ['simulated', 'entered', 'papr'] as const
export const roles = ['reference', 'chosen', 'fallback', 'rejected'] as const

const snrDb = (what: string) => numberBetween(-60, 120, `Enter ${what} of the SNR range from −60 to 120 dB.`)
const ratio = numberBetween(1e-3, 1e3, 'A ring ratio is a number from 0.001 to 1,000.')
const coordinate = numberBetween(-1e9, 1e9, 'A coordinate is a number from −1e9 to 1e9.')

const order = wholeBetween(2, 4096, 'Order M is a whole number from 2 to 4096.')
const rings = z.array(wholeBetween(1, 4096, 'A ring has 1 to 4096 points.')).min(1, 'Enter at least one ring.').max(64, 'At most 64 rings.')
const ratios = z.array(ratio).max(63, 'At most 63 ring ratios.')
const phasesDeg = z.array(numberBetween(-360, 360, 'A ring phase is from −360° to 360°.')).max(64, 'At most 64 ring phases.')
const lattice = z.enum(lattices, { error: 'A lattice is A2, D4 or E8.' })
const offset = z.array(numberBetween(-1e3, 1e3, 'An offset is of numbers from −1,000 to 1,000, in minimum distances.'))
  .min(1, 'An offset has a coordinate for each dimension.').max(8, 'An offset has at most 8 coordinates.')

/** Families that a Cartesian product may be made of: products are not nested, and points of one's own stand by themselves. */
export const factorFamilies = families.map(f => f.id).filter(family => !['product', 'custom'].includes(family))

/** One factor of a Cartesian product: a family with its parameters. */
export const factor = z.strictObject({
  family: z.enum(factorFamilies, { error: 'A factor is a family of the list other than a product or points of your own.' }),
  order: order.optional(), rings: rings.optional(), ratios: ratios.optional(), phasesDeg: phasesDeg.optional(),
  lattice: lattice.optional(), offset: offset.optional(),
})
export type Factor = z.infer<typeof factor>

/**
 * Inputs of a candidate: what the reader enters in one row.
 * Fields of other families stay as they are and are not used, so that a change of family loses nothing.
 */
export const candidateInputs = z.strictObject({
  name: name('the candidate\'s name'),
  family: z.enum(familyIds, { error: 'Choose a family of the list.' }),
  /** number of points M */
  order: order.nullable(),
  /** APSK: points on each ring, the innermost first */
  rings: rings.nullable(),
  /** APSK: radius of each further ring over that of the first ring of more than one point */
  ratios: ratios.nullable(),
  /** APSK: phase of each ring's first point in degrees; null: π/n */
  phasesDeg: phasesDeg.nullable(),
  /** custom: M points of N coordinates in signal units */
  points: z.array(z.array(coordinate).min(1, 'A point has 1 to 8 coordinates.').max(8, 'A point has at most 8 coordinates.'))
    .min(2, 'Enter 2 to 4096 points.').max(4096, 'Enter 2 to 4096 points.').nullable(),
  /** lattice: which one, and where its cut is centred, in minimum distances; null: the family's own */
  lattice: lattice.nullable(),
  offset: offset.nullable(),
  /** Cartesian product: its factors */
  factors: z.array(factor).min(2, 'A product has 2 to 8 factors.').max(8, 'A product has 2 to 8 factors.').nullable(),
  labelling: z.enum(labellings, { error: 'Labels are the family\'s, natural binary, or your own.' }),
  /** own labels: a word of k bits for each point, the most significant bit first */
  labels: z.array(z.string({ error: 'A label is a word of bits such as 0110.' }).regex(/^[01]{1,12}$/, 'A label is a word of 1 to 12 bits such as 0110.'))
    .min(2, 'Enter a label for each point.').max(4096, 'Enter a label for each point, at most 4096.').nullable(),
  probabilityRule: z.enum(probabilityRules, { error: 'Probabilities are equal, shaped to an entropy, or your own.' }),
  /** wanted entropy H of shaped (Maxwell–Boltzmann) probabilities, bit per symbol */
  shapedEntropy: numberBetween(1e-3, 12, 'Enter an entropy above 0 and up to the bits per symbol k.').nullable(),
  /** own probabilities, one for each point */
  probabilities: z.array(numberBetween(0, 1, 'A probability is from 0 to 1.'))
    .min(2, 'Enter a probability for each point.').max(4096, 'Enter a probability for each point, at most 4096.').nullable(),
  decision: z.enum(decisions, { error: 'Decisions are by minimum distance or MAP.' }),
  normalisation: z.enum(normalisations, { error: 'Normalise to mean energy, peak energy or minimum distance.' }),
  /** minimum distance in signal units, where that is the normalisation */
  spacing: numberBetween(1e-9, 1e9, 'Spacing is a distance from 1e-9 to 1e9 signal units.').nullable(),
  basis: z.enum(bases, { error: 'The basis is uncoded, a rate threshold or entered.' }),
  codeRate: numberBetween(1e-6, 1, 'A code rate is above 0 and up to 1.'),
  /** rate threshold: what reaches the net bits per symbol, and how far the decoder stays above it */
  rateKind: z.enum(rateKinds, { error: 'A rate threshold is of the bit-metric rate or of the mutual information.' }),
  decoderGapDb: numberBetween(0, 60, 'Enter a decoder gap from 0 to 60 dB.').nullable(),
  decoderGapSource: text(300),
  enteredEsN0Db: numberBetween(-60, 120, 'Enter a required Es/N0 from −60 to 120 dB.').nullable(),
  enteredNetBits: numberBetween(1e-6, 64, 'Enter net bits per symbol above 0 and up to 64.').nullable(),
  enteredSource: text(300),
  channel: z.enum(channels, { error: 'The channel is AWGN, Rayleigh, Rician or Nakagami.' }),
  ricianKDb: numberBetween(-60, 60, 'Enter a Rician K from −60 to 60 dB.').nullable(),
  nakagamiM: numberBetween(0.5, 100, 'Enter a Nakagami m from 0.5 to 100.').nullable(),
  /** fading: branches of the maximal-ratio combiner */
  branches: wholeBetween(1, 16, 'Enter 1 to 16 branches.'),
  /** r.m.s. carrier phase error in degrees; 0: none */
  phaseErrorDeg: numberBetween(0, 45, 'Enter an r.m.s. phase error from 0° to 45°.'),
  /** symbols of a frame, for its error rate */
  frameSymbols: wholeBetween(1, 1e9, 'Enter 1 to 1,000,000,000 symbols a frame.').nullable(),
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
  lattice: null, offset: null, factors: null,
  labelling: 'family', labels: null, probabilityRule: 'equal', shapedEntropy: null, probabilities: null, decision: 'minimumDistance',
  normalisation: 'meanEnergy', spacing: null, basis: 'uncoded', codeRate: 1,
  rateKind: 'bitMetricRate', decoderGapDb: null, decoderGapSource: '',
  channel: 'awgn', ricianKDb: null, nakagamiM: null, branches: 1, phaseErrorDeg: 0, frameSymbols: null,
  enteredEsN0Db: null, enteredNetBits: null, enteredSource: '',
  snrStart: 0, snrStop: 40, snrStep: 1, rollOff: null, backOff: 'simulated', backOffDb: null, backOffExceedance: 1e-3,
  implementationLossDb: null, role: null, roleReason: '', note: '',
}

/** Inputs as they are stored: rows of earlier versions lack the fields that came later, which then take their defaults. */
export const completeInputs = (stored: Partial<CandidateInputs>): CandidateInputs => ({ ...defaultInputs, ...stored })

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
  /** columns that need heavy work, as far as somebody has asked for them */
  parts: candidateParts,
})
export type Candidate = z.infer<typeof candidate>
