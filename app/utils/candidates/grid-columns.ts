import type { ColDef } from 'ag-grid-community'
import type { Candidate } from '#shared/schemas/candidates'
import { columns } from '#shared/columns'
import type { Column } from '#shared/columns'
import { isEditable } from './cell-look'
import type { CellView } from './cell-look'
import type { CellLook } from './cell-looks'
import { characterPx, paddingPx } from './cell-size'
import type { ColumnSet } from './column-set'
import { GridEditor } from './grid-editor'
import { GridHeader } from './grid-header'
import type { HeaderParams } from './grid-header'
import { NameCell } from './name-cell'

/** What the columns of the grid ask of the page. */
export type GridSeams = Pick<HeaderParams, 'sort' | 'onSort'> & {
  view: (row: Candidate, column: Column) => CellView
  look: (row: Candidate, column: Column) => CellLook
  pin: (row: Candidate) => number | null
  /** place of the row in the study, counted from 1 */
  place: (row: Candidate) => number
  canEdit: () => boolean
}

/** Id of the row numbers' column; it is no column of the study. */
export const placeColumn = 'place'
/** a number with its sign, or its row's state in a word */
const shortestNumber = 9

const placeDef = (seams: GridSeams): ColDef<Candidate> => ({
  colId: placeColumn, headerName: 'Row', width: 52, minWidth: 40, pinned: 'left', lockPinned: true, lockPosition: 'left', resizable: false,
  suppressMovable: true, cellClass: 'cell-place', headerClass: 'cell-place',
  valueGetter: ({ data }) => data ? seams.place(data) : null,
})

const editorOf = (column: Column, seams: GridSeams): Partial<ColDef<Candidate>> => {
  if (column.kind === 'computed' || column.type === 'points') return {}
  return {
    editable: ({ data }) => data !== undefined && isEditable(data, column, seams.canEdit()),
    cellEditor: GridEditor,
    cellEditorParams: {
      entry: { column, textOf: (row: Candidate) => seams.view(row, column).save?.text ?? column.text(row.inputs) },
    },
  }
}

/** Cells of numbers are as wide as their head, whose unit stands below its title; other cells as their column says. */
const widthOf = ({ type, title, unit, width }: Column) => {
  const characters = type === 'number' ? Math.max(title.length, unit?.length ?? 0, Math.min(width, shortestNumber)) : width
  return Math.round(characters * characterPx + paddingPx)
}

const columnDef = (column: Column, seams: GridSeams, shown: ReadonlySet<string>): ColDef<Candidate> => ({
  colId: column.id,
  headerComponent: GridHeader,
  headerComponentParams: { heading: { column, sort: seams.sort, onSort: seams.onSort } satisfies HeaderParams },
  headerName: column.title,
  headerClass: column.type === 'number' ? 'head-number' : undefined,
  width: widthOf(column),
  minWidth: 48,
  hide: !shown.has(column.id),
  pinned: column.id === 'name' ? 'left' : undefined,
  lockPinned: true,
  valueGetter: ({ data }) => data ? seams.look(data, column).text : '',
  // States of a cell change without its text: always draw it again.
  equals: () => false,
  cellClass: ({ data }) => data ? seams.look(data, column).classes : [],
  ...editorOf(column, seams),
  ...column.id === 'name'
    ? { cellRenderer: NameCell, cellRendererParams: { cell: { text: (row: Candidate) => seams.look(row, column).text, pin: seams.pin } } }
    : {},
})

/** Column definitions of the grid out of the study's columns, those of the set shown, in its order. */
export function gridColumns(seams: GridSeams, set: ColumnSet): ColDef<Candidate>[] {
  const shown = new Set(set.map(({ id }) => id))
  const rank = new Map(set.map(({ id }, index) => [id, index]))
  const ordered = [...columns].sort((a, b) => (rank.get(a.id) ?? Infinity) - (rank.get(b.id) ?? Infinity) || 0)
  const widths = new Map(set.map(({ id, width }) => [id, width]))
  return [placeDef(seams), ...ordered.map((column) => {
    const def = columnDef(column, seams, shown)
    return { ...def, width: widths.get(column.id) ?? def.width }
  })]
}
