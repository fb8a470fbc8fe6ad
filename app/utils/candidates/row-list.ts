import type { Candidate } from '#shared/schemas/candidates'

/** What a change of the list means to who shows it: `structure` when rows came, went or moved, and the rows whose content changed. */
export type RowsChange = { structure: boolean, ids: string[] }

/** A row that the page looks up among all: pinned, or the reference. */
const isMarked = (row: Candidate | undefined) => row !== undefined && (row.pin !== null || row.inputs.role === 'reference')

const byPosition = (a: Candidate, b: Candidate) => a.position - b.position || (a.id < b.id ? -1 : 1)

/**
 * Rows of a study in the order of their positions, found by id.
 * Plain data on purpose: 10,000 rows of 60 values each are too many for deep reactivity.
 */
export class RowList {
  private ordered: Candidate[] = []
  private readonly known = new Map<string, Candidate>()
  /** index of each row in `ordered` */
  private places = new Map<string, number>()
  private markedRows: Candidate[] = []

  get rows(): readonly Candidate[] {
    return this.ordered
  }

  /** Pinned rows and the reference, in order; the same list until one of them changes. */
  get marked(): readonly Candidate[] {
    return this.markedRows
  }

  get(id: string): Candidate | undefined {
    return this.known.get(id)
  }

  /** Place of a row among all, counted from 0. */
  placeOf(id: string): number | undefined {
    return this.places.get(id)
  }

  clear() {
    this.known.clear()
    this.order([])
    this.markedRows = []
  }

  private order(rows: Candidate[]) {
    this.ordered = rows
    this.places = new Map(rows.map((row, index) => [row.id, index]))
  }

  private mark() {
    this.markedRows = this.ordered.filter(isMarked)
  }

  /** Takes rows over, new ones and known ones; the order is made anew only when it may have changed. */
  put(rows: readonly Candidate[]): RowsChange {
    let structure = false
    let marks = false
    for (const row of rows) {
      const before = this.known.get(row.id)
      if (before?.position !== row.position) structure = true
      if (isMarked(before) || isMarked(row)) marks = true
      this.known.set(row.id, row)
    }
    if (structure) {
      this.order([...this.known.values()].sort(byPosition))
    } else if (rows.length > 0) {
      this.ordered = this.ordered.slice()
      for (const row of rows) this.ordered[this.places.get(row.id) ?? 0] = row
    }
    if (marks) this.mark()
    return { structure, ids: rows.map(row => row.id) }
  }

  remove(ids: readonly string[]): RowsChange {
    const gone = ids.filter(id => this.known.delete(id))
    if (gone.length > 0) {
      this.order(this.ordered.filter(row => this.known.has(row.id)))
      this.mark()
    }
    return { structure: gone.length > 0, ids: gone }
  }
}

/**
 * Whether an answer to a request of our own is at least as new as the row shown.
 * The event with the computed values may overtake the answer to the edit that caused it; that answer must not bring "computing" back.
 */
export function isNewer(answer: Candidate, shown: Candidate | undefined): boolean {
  return !shown || answer.version > shown.version || (answer.version === shown.version && shown.state === 'computing')
}
