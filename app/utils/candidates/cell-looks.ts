import type { Candidate } from '#shared/schemas/candidates'
import type { Column } from '#shared/columns'
import { cellClasses, cellText } from './cell-look'
import type { CellView } from './cell-look'

export type CellLook = { text: string, classes: string[] }

/**
 * Looks of cells, each worked out once: the grid asks for text and classes several times a cell, and again whenever a row
 * comes back into sight. A changed row is another object and starts afresh; what else a look depends on is forgotten by hand.
 */
export class CellLooks {
  private rows = new WeakMap<Candidate, Map<string, CellLook>>()

  constructor(private readonly view: (row: Candidate, column: Column) => CellView) {}

  of(row: Candidate, column: Column): CellLook {
    let looks = this.rows.get(row)
    if (!looks) this.rows.set(row, looks = new Map())
    let look = looks.get(column.id)
    if (!look) {
      const view = this.view(row, column)
      looks.set(column.id, look = { text: cellText(view), classes: cellClasses(view) })
    }
    return look
  }

  /** A cell of the row is being saved, or no longer. */
  forget(row: Candidate): void {
    this.rows.delete(row)
  }

  /** What every row is compared with has changed. */
  forgetAll(): void {
    this.rows = new WeakMap()
  }
}
