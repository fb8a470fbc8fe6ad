/**
 * How a pinned row is drawn, wherever it is drawn. A row is told by its marker and its ink, the kind of a line by its
 * dash: exact is solid, the union bound dashed, the approximation dotted. Within the two broken kinds each row has a
 * cadence of its own (the length of its dashes, the pitch of its dots), so that crossing bounds stay apart in one ink.
 */
export type PinStyle = {
  /** value for stroke or fill on either sheet */
  colour: string
  /** stroke-dasharray of a sample 32 units long: solid up to the marker in its middle, then the row's own dashes */
  dash: string
  /** path data around 0,0 within ±4.5 units, drawn as an outline that is filled with the paper */
  marker: string
  markerName: string
}
export type LineKind = 'exact' | 'union' | 'nearest'

export const pinSlots = 12

const markers: readonly { name: string, path: string }[] = [
  { name: 'circle', path: 'M-4 0A4 4 0 1 1 4 0A4 4 0 1 1 -4 0Z' },
  { name: 'square', path: 'M-3.5 -3.5H3.5V3.5H-3.5Z' },
  { name: 'triangle', path: 'M0 -4.5L4.2 3.2H-4.2Z' },
  { name: 'diamond', path: 'M0 -4.5L4.5 0L0 4.5L-4.5 0Z' },
  { name: 'inverted triangle', path: 'M0 4.5L4.2 -3.2H-4.2Z' },
  { name: 'cross', path: 'M0 -4.5V4.5M-4.5 0H4.5' },
  { name: 'saltire', path: 'M-3.6 -3.6L3.6 3.6M-3.6 3.6L3.6 -3.6' },
  { name: 'half disc', path: 'M-2 -4.2A4.2 4.2 0 0 1 -2 4.2Z' },
  { name: 'hourglass', path: 'M-3.6 -4H3.6L-3.6 4H3.6Z' },
  { name: 'star', path: 'M0 -4.5L1.1 -1.5L4.3 -1.4L1.8 0.6L2.7 3.7L0 1.9L-2.7 3.7L-1.8 0.6L-4.3 -1.4L-1.1 -1.5Z' },
  { name: 'ringed point', path: 'M-4.2 0A4.2 4.2 0 1 1 4.2 0A4.2 4.2 0 1 1 -4.2 0ZM-0.6 0A0.6 0.6 0 1 1 0.6 0A0.6 0.6 0 1 1 -0.6 0Z' },
  { name: 'beam', path: 'M-3.6 -4.2H3.6M-3.6 4.2H3.6M0 -4.2V4.2' },
]

const cadences = [{ dash: 7, pitch: 4 }, { dash: 4, pitch: 3 }, { dash: 12, pitch: 6 }, { dash: 9, pitch: 8 }] as const
const gap = 3

const placeOf = (slot: number) => {
  if (!Number.isInteger(slot) || slot < 1 || slot > pinSlots) throw new RangeError(`A pin's slot is a whole number from 1 to ${pinSlots}.`)
  return slot - 1
}
const cadenceOf = (slot: number) => cadences[placeOf(slot) % cadences.length]!

/**
 * Ink, sample dash and marker of a pinned row.
 * @param slot 1 to 12
 * @throws RangeError for any other slot
 */
export function pinStyle(slot: number): PinStyle {
  const { name, path } = markers[placeOf(slot)]!
  const { dash } = cadenceOf(slot)
  return {
    colour: `rgb(var(--pin-${slot}))`,
    dash: ['16', ...Array.from({ length: 4 }, () => `${gap} ${dash}`), '0'].join(' '),
    marker: path,
    markerName: name,
  }
}

/**
 * stroke-dasharray of one of a row's lines; round caps turn the zero-length dashes of the approximation into dots.
 * @param slot 1 to 12
 * @throws RangeError for any other slot
 */
export function lineDash(kind: LineKind, slot: number): string {
  const { dash, pitch } = cadenceOf(slot)
  return kind === 'exact' ? 'none' : kind === 'union' ? `${dash} ${gap}` : `0 ${pitch}`
}
