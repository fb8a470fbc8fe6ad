import type { Candidate } from '#shared/schemas/candidates'

/** What a change of the list means to who shows it: `structure` when rows came, went or moved, and the rows whose content changed. */
export type RowsChange = { structure: boolean, ids: string[] }

const byPosition = (a: Candidate, b: Candidate) => a.position - b.position || (a.id < b.id ? -1 : 1)

/**
 * Rows of a study in the order of their positions, found by id.
 * Plain data on purpose: 10,000 rows of 60 values each are too many for deep reactivity.
 */
export class RowList {
  private ordered: Candidate[] = []
  private readonly known = new Map<string, Candidate>()

  get rows(): readonly Candidate[] {
    return this.ordered
  }

  get(id: string): Candidate | undefined {
    return this.known.get(id)
  }

  clear() {
    this.known.clear()
    this.ordered = []
  }

  /** Takes rows over, new ones and known ones; the order is made anew only when it may have changed. */
  put(rows: readonly Candidate[]): RowsChange {
    let structure = false
    for (const row of rows) {
      if (this.known.get(row.id)?.position !== row.position) structure = true
      this.known.set(row.id, row)
    }
    if (structure) this.ordered = [...this.known.values()].sort(byPosition)
    else if (rows.length > 0) this.ordered = this.ordered.map(row => this.known.get(row.id) ?? row)
    return { structure, ids: rows.map(row => row.id) }
  }

  remove(ids: readonly string[]): RowsChange {
    const gone = ids.filter(id => this.known.delete(id))
    if (gone.length > 0) this.ordered = this.ordered.filter(row => this.known.has(row.id))
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
