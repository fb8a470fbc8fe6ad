import type { CandidateValues } from '#shared/schemas/values'

/** The SNR that the overlay is drawn against, in dB. Each differs from Es/N0 by a constant of the row (methods §0). */
export const snrAxes = [
  { id: 'esN0', title: 'Es/N0' },
  { id: 'ebN0', title: 'Eb/N0' },
  { id: 'epkN0', title: 'Epk/N0' },
  { id: 'distance', title: 'd_min²/(2·N0)' },
] as const
export type SnrAxis = (typeof snrAxes)[number]['id']

export const snrAxisTitle = (axis: SnrAxis) => snrAxes.find(({ id }) => id === axis)!.title

type Needed = Pick<CandidateValues, 'netBits' | 'paprDb' | 'minimumDistance'>

/**
 * What to add to a row's Es/N0 to get its place on an axis.
 * @param values net bits per symbol, PAPR of the constellation in dB, minimum distance at Es = 1
 * @returns dB; null where the row has no such number
 */
export function snrShiftDb(axis: SnrAxis, { netBits, paprDb, minimumDistance }: Needed): number | null {
  switch (axis) {
    case 'esN0': return 0
    case 'ebN0': return netBits > 0 ? -10 * Math.log10(netBits) : null
    case 'epkN0': return paprDb
    case 'distance': return minimumDistance === null ? null : 10 * Math.log10(minimumDistance ** 2 / 2)
  }
}
