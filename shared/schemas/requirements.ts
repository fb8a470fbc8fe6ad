import { z } from 'zod'
import { ModulationError } from '../modulation/errors'
import { linkCase as sumUp } from '../modulation/link'
import { decibels, name, numberBetween, text } from './common'

/** Must-haves of a study; each kind has one unit, and `low` to `high` in that unit as its limits. */
export const mustHaveKinds = {
  margin: { title: 'Required margin', unit: 'dB', sense: 'atLeast', low: -100, high: 100, allowed: 'Enter a required margin from −100 to 100 dB.' },
  netBitRate: { title: 'Minimum net bit rate', unit: 'Mbit/s', sense: 'atLeast', low: 0, high: 1e9, allowed: 'Enter a net bit rate from 0 to 1e9 Mbit/s.' },
  occupiedBandwidth: { title: 'Maximum occupied bandwidth', unit: 'MHz', sense: 'atMost', low: 0, high: 1e9, allowed: 'Enter a bandwidth from 0 to 1e9 MHz.' },
  spectralEfficiency: { title: 'Minimum spectral efficiency', unit: 'bit/s/Hz', sense: 'atLeast', low: 0, high: 100, allowed: 'Enter a spectral efficiency from 0 to 100 bit/s/Hz.' },
  papr: { title: 'Maximum PAPR', unit: 'dB', sense: 'atMost', low: 0, high: 100, allowed: 'Enter a PAPR from 0 to 100 dB.' },
} as const
export type MustHaveKind = keyof typeof mustHaveKinds

export const mustHave = z.strictObject({
  id: z.string({ error: 'Give the requirement an ID.' }).trim().min(1, 'Give the requirement an ID.').max(24, 'An ID has at most 24 characters.'),
  kind: z.enum(Object.keys(mustHaveKinds) as MustHaveKind[], { error: 'Choose what the requirement limits.' }),
  /** in the kind's unit */
  value: z.number({ error: 'Enter a number.' }),
  reason: text(1000),
}).superRefine(({ kind, value }, refine) => {
  const { low, high, allowed } = mustHaveKinds[kind]
  if (value < low || value > high) refine.addIssue({ code: 'custom', path: ['value'], message: allowed })
})
export type MustHave = z.infer<typeof mustHave>

const partId = z.string({ error: 'Give it an identifier.' }).min(1, 'Give it an identifier.').max(40, 'An identifier has at most 40 characters.')
const lineBase = { id: partId, name: name('the line\'s name', 80), source: text(300) }
/** Least frequency, distance or rate: smaller ones are slips of the pen, and what they lead to leaves the range of doubles. */
const least = 1e-9

/** One line of the link budget. Losses are entered positive and subtracted. */
export const linkLine = z.discriminatedUnion('kind', [
  z.strictObject({ ...lineBase, kind: z.literal('power'), unit: z.enum(['dBm', 'dBW'], { error: 'The unit is dBm or dBW.' }), valueDb: decibels }),
  z.strictObject({ ...lineBase, kind: z.literal('gain'), valueDb: decibels }),
  z.strictObject({ ...lineBase, kind: z.literal('loss'), valueDb: numberBetween(0, 400, 'Enter a loss as 0 to 400 dB; it is subtracted.') }),
  z.strictObject({
    ...lineBase, kind: z.literal('freeSpaceLoss'),
    frequencyGhz: numberBetween(least, 1e6, 'Enter a frequency from 1e-9 to 1,000,000 GHz.'),
    distanceKm: numberBetween(least, 1e12, 'Enter a distance from 1e-9 to 1e12 km.'),
  }),
  z.strictObject({ ...lineBase, kind: z.literal('noiseFigure'), noiseFigureDb: numberBetween(0, 100, 'Enter a noise figure from 0 to 100 dB.') }),
], { error: 'A line is a power, a gain, a loss, a free-space loss or a noise figure.' })
export type LinkLine = z.infer<typeof linkLine>

/** A link case such as clear or faded: what it adds to the common lines. */
export const linkCase = z.strictObject({
  id: partId,
  name: name('the case\'s name', 60),
  /** null: the study's required margin holds */
  requiredMarginDb: decibels.nullable(),
  lines: z.array(linkLine).max(60, 'A case has at most 60 lines.'),
})
export type LinkCase = z.infer<typeof linkCase>

const unique = <T>(key: (item: T) => string) => (items: T[]) => new Set(items.map(key)).size === items.length

/** Refuses lines that contradict each other within a case, at their own place: the common lines come first in every case. */
function refuseContradictions({ lines, cases }: { lines: LinkLine[], cases: LinkCase[] }, refine: z.RefinementCtx) {
  if (refine.issues.length > 0) return
  cases.forEach((item, i) => {
    try {
      sumUp([...lines, ...item.lines])
    } catch (error) {
      if (!(error instanceof ModulationError)) throw error
      const [, index, ...field] = error.path
      const path = typeof index !== 'number'
        ? ['cases', i, 'lines']
        : index < lines.length ? ['lines', index, ...field] : ['cases', i, 'lines', index - lines.length, ...field]
      refine.addIssue({ code: 'custom', path, message: error.message })
    }
  })
}

/** Where a row's available Es/N0 comes from. */
export const available = z.discriminatedUnion('from', [
  z.strictObject({ from: z.literal('entered'), esN0Db: decibels }),
  z.strictObject({
    from: z.literal('link'),
    lines: z.array(linkLine).max(60, 'A link budget has at most 60 common lines.'),
    cases: z.array(linkCase).min(1, 'A link budget has at least one case.').max(12, 'A link budget has at most 12 cases.')
      .refine(unique<{ name: string }>(c => c.name.toLowerCase()), 'Every case has a name of its own.')
      .refine(unique<{ id: string }>(c => c.id), 'Every case has an identifier of its own.'),
  }).superRefine(refuseContradictions),
  z.strictObject({ from: z.literal('noiseDensity'), n0: numberBetween(1e-30, 1e12, 'Enter N0 from 1e-30 to 1e12, in signal units squared.') }),
], { error: 'Available Es/N0 is entered, from the link budget, or from N0.' })
export type Available = z.infer<typeof available>

export const heldConstantKinds = {
  symbolRate: { title: 'Symbol rate', unit: 'Msymbol/s' },
  occupiedBandwidth: { title: 'Occupied bandwidth', unit: 'MHz' },
  netBitRate: { title: 'Net bit rate', unit: 'Mbit/s' },
} as const
export type HeldConstant = keyof typeof heldConstantKinds

/** Error rates that a target may be stated as, and whether it is stated before or behind a decoder. */
export const targetQuantities = { ser: { title: 'SER', words: 'symbol error rate' }, ber: { title: 'BER', words: 'bit error rate' } } as const
export type TargetQuantity = keyof typeof targetQuantities
export const targetStages = ['beforeDecoding', 'afterDecoding'] as const

/** The error rate to meet. For uncoded rows both stages are the same. */
export const target = z.strictObject({
  quantity: z.enum(Object.keys(targetQuantities) as TargetQuantity[], { error: 'The target is a symbol error rate (ser) or a bit error rate (ber).' }),
  value: numberBetween(1e-15, 0.5, 'Enter a target error rate from 1e-15 to 0.5.'),
  stage: z.enum(targetStages, { error: 'The target holds before or after decoding.' }).default('afterDecoding'),
})
export type Target = z.infer<typeof target>

/** Requirements of a study in their first form. */
export const requirements = z.strictObject({
  target,
  mustHaves: z.array(mustHave).max(20, 'A study has at most 20 must-haves.')
    .refine(unique<{ id: string }>(m => m.id.toLowerCase()), 'Every must-have has an ID of its own.')
    .refine(unique<{ kind: string }>(m => m.kind), 'Each kind of must-have is stated once.'),
  heldConstant: z.strictObject({
    kind: z.enum(Object.keys(heldConstantKinds) as HeldConstant[], { error: 'Hold the symbol rate, the occupied bandwidth or the net bit rate constant.' }),
    /** Msymbol/s, MHz or Mbit/s by kind */
    value: numberBetween(least, 1e9, 'Enter a value from 1e-9 to 1e9.'),
  }),
  limitedBy: z.enum(['meanPower', 'peakPower'], { error: 'The amplifier is limited by mean or by peak power.' }),
  /** share of the bit rate spent on framing, 0 to below 1 */
  overhead: numberBetween(0, 0.95, 'Enter an overhead from 0 to 0.95 (0 to 95 %).'),
  /** of the root-raised-cosine pulse */
  rollOff: numberBetween(0, 1, 'Enter a roll-off from 0 to 1.'),
  implementationLossDb: numberBetween(0, 100, 'Enter an implementation loss from 0 to 100 dB.'),
  /** real dimensions that one symbol interval of one Nyquist band offers */
  dimensionsPerInterval: z.union([z.literal(1), z.literal(2), z.literal(4)], { error: 'One symbol interval offers 1, 2 or 4 real dimensions.' }),
  available,
})
export type Requirements = z.infer<typeof requirements>

/** What a new study starts with: a plain set of requirements that computes at once. */
export const defaultRequirements: Requirements = {
  target: { quantity: 'ser', value: 1e-6, stage: 'afterDecoding' },
  mustHaves: [{ id: 'R1', kind: 'margin', value: 1, reason: '' }],
  heldConstant: { kind: 'symbolRate', value: 1 },
  limitedBy: 'meanPower',
  overhead: 0,
  rollOff: 0.25,
  implementationLossDb: 0,
  dimensionsPerInterval: 2,
  available: { from: 'entered', esN0Db: 20 },
}

/** Requirements as they are stored: those of earlier versions do not say at which stage their target holds. */
export const completeRequirements = (stored: z.input<typeof requirements>): Requirements =>
  ({ ...stored, target: { ...stored.target, stage: stored.target.stage ?? 'afterDecoding' } })
