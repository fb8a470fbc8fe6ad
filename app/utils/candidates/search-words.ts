import { formatNumber } from '#shared/columns/format'
import { families } from '#shared/modulation/families'
import type { CandidateInputs } from '#shared/schemas/candidates'
import { freeParameters } from '#shared/schemas/searches'
import type { Search, SearchProgress } from '#shared/schemas/searches'

export type FreeParameter = (typeof freeParameters)[number]

/** What may move, in the reader's words, with what its numbers are counted in. */
export const freeTitles: Record<FreeParameter, { title: string, unit: string }> = {
  ratios: { title: 'Ring ratios', unit: '' },
  phases: { title: 'Ring phases', unit: '°' },
  offset: { title: 'Offset of the cut', unit: 'minimum distances' },
  points: { title: 'Points themselves', unit: 'signal units' },
}

/** Parameters of a row that a search may move: those of its family that have more than one free number. */
export function freeOf({ family, rings, ratios, lattice, points }: CandidateInputs): FreeParameter[] {
  const known = families.find(({ id }) => id === family)?.parameters ?? []
  const some: Record<FreeParameter, boolean> = {
    ratios: (ratios?.length ?? 0) > 0,
    phases: (rings?.filter(n => n > 1).length ?? 0) > 1,
    // Left out it is zero, from where it is searched too.
    offset: lattice !== null,
    points: (points?.length ?? 0) > 1,
  }
  return freeParameters.filter(parameter => known.includes(parameter) && some[parameter])
}

const kindWords = { labels: 'Search of labels', parameters: 'Search of parameters' } as const

/** A value of what a search lowers, with its unit. */
const valueText = (value: number, unit: string | null) => unit === null ? formatNumber(value, '0.00e-0') : `${formatNumber(value, '0.000')} ${unit}`

/** Best so far against the start. */
export const progressText = ({ what, unit, value, startValue }: SearchProgress): string => value < startValue
  ? `${what}: ${valueText(value, unit)}, from ${valueText(startValue, unit)} at the start`
  : `${what}: ${valueText(startValue, unit)} as at the start`

/** What a search is called. @param name of its row, where that is still there */
export const searchTitle = ({ kind }: Search, name: string | null): string => `${kindWords[kind]}${name ? ` for ${name}` : ''}`

/** How far a search is, of how much: starts, or evaluations where these are limited. */
export const searchShare = ({ startsDone, starts, evaluations, budget }: SearchProgress): { value: number, max: number, of: string } => budget === null
  ? { value: startsDone, max: starts, of: 'starts' }
  : { value: Math.min(evaluations, budget), max: budget, of: 'evaluations' }

/** What is said at the end of a search. */
export function searchOutcome(search: Search, name: string | null): string {
  const { progress } = search
  if (!progress) return `${searchTitle(search, name)} has ended.`
  const unsettled = !progress.converged && progress.low !== null && progress.high !== null
    ? ` It has not settled: the last steps lay between ${valueText(progress.low, progress.unit)} and ${valueText(progress.high, progress.unit)}.`
    : ''
  const found = search.resultId ? ' It stands in a new row behind its origin.' : ' Nothing better was found.'
  return `${searchTitle(search, name)} has ended: ${progressText(progress)}.${unsettled}${found}`
}
