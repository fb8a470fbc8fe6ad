import type { Candidate } from '#shared/schemas/candidates'
import type { Member } from '#shared/schemas/members'
import type { Study } from '#shared/schemas/studies'
import type { CandidateCurves } from '#shared/schemas/values'

/** Everything that an export of one study says, gathered before the first byte is sent; rows come page by page. */
export interface StudyExport {
  study: Study
  members: Member[]
  /** who asked for it, when, and by which versions it was computed */
  by: string
  at: Date
  version: string
  coreVersion: string
  counts: { candidates: number, passing: number, failed: number, computing: number }
  reference: Candidate | null
  /** the ten passing or nearly passing rows with the largest surplus, best first */
  leading: Candidate[]
  /** rows on the overlay, by slot, with their curves */
  pinned: { row: Candidate, curves: CandidateCurves }[]
  /** points of the pinned rows and of those with a role, after the row's normalisation */
  constellations: () => Iterable<{ row: Candidate, points: number[][] }>
  /** all rows in the grid's order, a page at a time */
  rows: () => AsyncIterable<Candidate[]>
}
