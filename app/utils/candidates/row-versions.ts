/**
 * The version of a row that each edit is based on: the one that its reader saw, carried on only by what this page's own
 * edits have made of it. A version that somebody else's change brought in between is never taken: the server then
 * refuses the edit, and the reader is offered both values.
 */
export class RowVersions {
  /** by row: this page's edits without a gap, from the version that the first was based on to the one that the last has made */
  private readonly runs = new Map<string, { from: number, to: number }>()

  /**
   * Base of an edit that is sent now.
   * @param seen version that was shown when the value was entered
   */
  baseOf(row: string, seen: number): number {
    const run = this.runs.get(row)
    return run && seen >= run.from ? Math.max(seen, run.to) : seen
  }

  /** Notes that an edit based on `base` has made `version`. */
  saved(row: string, base: number, version: number): void {
    const run = this.runs.get(row)
    if (run?.to === base) run.to = version
    else this.runs.set(row, { from: base, to: version })
  }
}
