import type { CandidateInputs } from '#shared/schemas/candidates'
import { defaultInputs } from '#shared/schemas/candidates'
import type { LinkLine, Requirements } from '#shared/schemas/requirements'
import type { SweepCreation } from '#shared/schemas/sweeps'
import { describeCandidate } from '#shared/study/describe-candidate'

/*
 * The demonstration's studies as plain data. All of it is invented: a mountain weather service moves data from an
 * unattended ridge station to a valley gateway.
 */

const loss = (id: string, name: string, valueDb: number, source = ''): LinkLine => ({ id, name, source, kind: 'loss', valueDb })
const gain = (id: string, name: string, valueDb: number, source = ''): LinkLine => ({ id, name, source, kind: 'gain', valueDb })

const lines: LinkLine[] = [
  { id: 'output', name: 'Saturated output', source: 'Amplifier data sheet, worst unit', kind: 'power', unit: 'dBm', valueDb: 27 },
  loss('transmit-feeder', 'Transmit feeder', 1.2, '11 m of waveguide, measured'),
  gain('transmit-antenna', 'Transmit antenna, 0.6 m', 30.9, 'Antenna data sheet'),
  { id: 'free-space', name: 'Free space', source: 'Path survey', kind: 'freeSpaceLoss', frequencyGhz: 7.5, distanceKm: 38 },
  loss('gas', 'Gas absorption', 0.4, 'Standard atmosphere along the path'),
  gain('receive-antenna', 'Receive antenna, 0.6 m', 30.9, 'Antenna data sheet'),
  loss('receive-feeder', 'Receive feeder', 1.2, '11 m of waveguide, measured'),
  { id: 'noise', name: 'Receiver noise figure', source: 'Receiver data sheet, at 290 K', kind: 'noiseFigure', noiseFigureDb: 5 },
]

export const ridgeLink: { name: string, description: string, requirements: Requirements } = {
  name: 'Ridge station to valley gateway',
  description: 'Radio link of an unattended weather station: 38 km at 7.5 GHz in a 7 MHz channel, with a peak-limited amplifier.',
  requirements: {
    target: { quantity: 'ser', value: 1e-6, stage: 'afterDecoding' },
    mustHaves: [
      { id: 'R1', kind: 'margin', value: 1, reason: 'Nobody can reach the station in winter; 1 dB covers ageing until the next visit.' },
      { id: 'R2', kind: 'netBitRate', value: 20, reason: 'Radar sectors, camera and sensors together, every ten seconds.' },
      { id: 'R3', kind: 'occupiedBandwidth', value: 7, reason: 'The channel that has been assigned.' },
    ],
    heldConstant: { kind: 'symbolRate', value: 5.6 },
    limitedBy: 'peakPower',
    overhead: 0.05,
    rollOff: 0.25,
    implementationLossDb: 1.5,
    dimensionsPerInterval: 2,
    available: {
      from: 'link',
      lines,
      cases: [
        { id: 'clear', name: 'Clear', requiredMarginDb: null, lines: [] },
        {
          id: 'faded', name: 'Faded', requiredMarginDb: null,
          lines: [
            loss('snow', 'Wet snow on two antennas', 8, 'Three winters of the old link'),
            loss('pointing', 'Mispointing by ice', 0.5, 'Mast survey'),
            loss('multipath', 'Multipath', 8.7, 'Path survey, worst month'),
          ],
        },
      ],
    },
  },
}

/** A row with what differs from the defaults. */
const row = (inputs: Partial<CandidateInputs>): CandidateInputs => {
  const full = { ...defaultInputs, snrStart: 6, snrStop: 30, snrStep: 0.5, ...inputs }
  return { ...full, name: inputs.name ?? describeCandidate(full) }
}
const rings = (counts: number[], ratios: number[], more: Partial<CandidateInputs> = {}) =>
  row({ family: 'apsk', order: counts.reduce((a, b) => a + b), rings: counts, ratios, ...more })
/** 32 points of the standard: inner rings at 45° and 15°, the outer ring with a point at 0°. */
const thirtyTwo = (codeRate: string, middle: number, outer: number) =>
  rings([4, 12, 16], [middle, outer], { phasesDeg: [45, 15, 0], note: `Ring ratios published for code rate ${codeRate}.` })

/** The 24 rows of the study, in the order of its grid; the first four are pinned. */
export const ridgeRows: CandidateInputs[] = [
  row({ family: 'qam', order: 16, role: 'reference', note: 'What the old link would have taken.' }),
  rings([4, 12], [2.57], { role: 'chosen', roleReason: 'Passes in the faded case, and its labels are published: no modem vendor has to be persuaded.' }),
  rings([5, 11], [2.2], { role: 'fallback', roleReason: 'The best margin at the amplifier, should the labels turn out not to matter.' }),
  row({ family: 'hexagonal', order: 16, note: 'Least required SNR of 16 points; the amplifier takes the advantage back.' }),
  rings([1, 5, 10], [1.95]),
  rings([4, 12], [3.15], { note: 'Ratio published for code rate 2/3.' }),
  row({ family: 'psk', order: 16, role: 'rejected', roleReason: 'Short by almost 3 dB in the faded case.' }),
  row({ family: 'cross-qam', order: 32 }),
  row({ family: 'psk', order: 8, role: 'rejected', roleReason: '16 Mbit/s: a fifth below what the sensors send.' }),
  row({ family: 'psk', order: 4 }),
  row({ family: 'qam', order: 8, name: '4×2 grid' }),
  rings([1, 7], []),
  row({ family: 'hexagonal', order: 8 }),
  row({ family: 'hexagonal', order: 32 }),
  rings([4, 12], [2.6]),
  rings([4, 12], [2.7]),
  rings([4, 12], [2.75]),
  rings([4, 12], [2.85]),
  rings([6, 10], [2]),
  thirtyTwo('3/4', 2.84, 5.27),
  thirtyTwo('4/5', 2.72, 4.87),
  thirtyTwo('5/6', 2.64, 4.64),
  thirtyTwo('8/9', 2.54, 4.33),
  row({ family: 'qam', order: 64 }),
]

/** How many of the rows are pinned, from the first on. */
export const ridgePins = 4

export const ringSweep: { name: string, description: string, requirements: Requirements, sweep: SweepCreation } = {
  name: 'Ring ratios of sixteen points',
  description: 'How required Es/N0, back-off and margin move with the ring ratio, for two ways to split sixteen points.',
  requirements: ridgeLink.requirements,
  // 2 splits × 100 ratios
  sweep: {
    base: { family: 'apsk', order: 16, snrStart: 6, snrStop: 30, snrStep: 0.5 },
    axes: [
      { field: 'rings', values: [[4, 12], [5, 11]] },
      { field: 'ratios.0', start: 1.51, stop: 3.49, step: 0.02 },
    ],
  },
}

export const emptyStudy = { name: 'Buoy to shore', description: 'Nothing in it so far.' }
