import type { SuppressKeyboardEventParams } from 'ag-grid-community'
import type { Candidate } from '#shared/schemas/candidates'

/** What keys do on a cell that is not being edited, beside the grid's own arrows, Enter, Tab and typing. */
export type GridKeys = {
  /** Space; with Shift up to the row selected last */
  select: (row: Candidate, upTo: boolean) => void
  selectAll: () => void
  /** Delete: clears the input cell, never the row */
  clear: (row: Candidate, column: string) => void
  /** Ctrl+C: the cell's full value */
  copy: (row: Candidate, column: string) => void
  /** Alt+W: why this number */
  why: (row: Candidate, column: string) => void
  /** Escape: closes what Alt+W has opened */
  leave: () => void
  /** Alt+P: pins the rows that commands act on, or unpins them */
  pin: () => void
  /** Home: beside the grid's own move, which stays in the frozen columns, the others go back to their start */
  home: () => void
  /** Enter on a cell that opens a dialog; @returns whether it did */
  open: (row: Candidate, column: string) => boolean
}

/**
 * Runs the command of a key.
 * @returns whether the grid itself is to leave the key alone
 */
export function handleKey({ event, editing, data, column }: SuppressKeyboardEventParams<Candidate>, keys: GridKeys): boolean {
  if (editing || !data) return false
  const [ctrl, id] = [event.ctrlKey || event.metaKey, column.getColId()]
  const run = (command: () => void) => {
    event.preventDefault()
    command()
    return true
  }
  if (event.altKey && event.code === 'KeyW') return run(() => keys.why(data, id))
  if (event.key === 'Escape') return run(keys.leave)
  if (event.altKey && event.code === 'KeyP') return run(keys.pin)
  if (ctrl && event.code === 'KeyA') return run(keys.selectAll)
  if (ctrl && event.code === 'KeyC') return run(() => keys.copy(data, id))
  if (event.key === ' ') return run(() => keys.select(data, event.shiftKey))
  if (event.key === 'Delete' || event.key === 'Backspace') return run(() => keys.clear(data, id))
  if (event.key === 'Home') keys.home()
  if (event.key === 'Enter' && keys.open(data, id)) return run(() => undefined)
  return false
}
