import type { GridApi } from 'ag-grid-community'
import type { Candidate } from '#shared/schemas/candidates'
import { columns } from '#shared/columns'
import type { ColumnContext, ComputedColumn } from '#shared/columns'
import { characterPx, paddingPx } from './cell-size'

/** Columns whose cells may hold an interval. */
const estimated = columns.filter((column): column is ComputedColumn => column.kind === 'computed' && column.interval !== undefined)
/** "(20.79…20.91) 20.84" and "(1.10e−12…1.36e−12) 1.23e−12" */
const characters = ({ format }: ComputedColumn) => format === '0.00e-0' ? 31 : 22

/**
 * Makes room for intervals: a column is widened once, when the first interval comes into it, unless the reader has given it a width.
 * @param given whether the reader has given the column a width
 */
export function useEstimateWidths(api: () => GridApi<Candidate> | null, context: () => ColumnContext, given: (column: string) => boolean) {
  const widened = new Set<string>()
  return (rows: readonly Candidate[]) => {
    const grid = api()
    if (!grid) return
    const wide = estimated.filter(column => !widened.has(column.id) && rows.some(row => column.interval?.(row, context())))
    for (const { id } of wide) widened.add(id)
    const news = wide.filter(({ id }) => !given(id)).map(column => ({ key: column.id, newWidth: Math.round(characters(column) * characterPx + paddingPx) }))
    if (news.length > 0) grid.setColumnWidths(news.filter(({ key, newWidth }) => (grid.getColumn(key)?.getActualWidth() ?? newWidth) < newWidth), true, 'api')
  }
}
