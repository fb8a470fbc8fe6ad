import { isInterval, valueOf } from '../modulation/estimate'
import type { Estimate, Interval } from '../modulation/estimate'
import type { Candidate } from '../schemas/candidates'
import type { PartName, PartValuesOf } from '../schemas/parts'
import type { CandidateValues } from '../schemas/values'
import type { CellValue, ColumnContext, ComputedColumn } from './column'

/** A part's values as far as they have been computed. */
export const partValuesOf = <P extends PartName>(row: Candidate, part: P): PartValuesOf<P> | null =>
  (row.parts[part]?.values ?? null) as PartValuesOf<P> | null

type About<P extends PartName> = Pick<ComputedColumn, 'id' | 'title' | 'unit' | 'group' | 'meaning' | 'method' | 'formula' | 'source' | 'tolerance' | 'format' | 'width'>
  & Partial<Pick<ComputedColumn, 'round'>>
  & { lines: (values: PartValuesOf<P>, row: CandidateValues, candidate: Candidate, context: ColumnContext) => string[] }

/** A column whose numbers are computed when it is shown: one value of a part of the row. */
export function partColumn<P extends PartName>(part: P, key: keyof PartValuesOf<P>, about: About<P>): ComputedColumn {
  const estimate = (row: Candidate) => (partValuesOf(row, part)?.[key] ?? null) as Estimate | null
  return {
    kind: 'computed', type: 'number', round: 'nearest', firstOpening: false, part, ...about,
    value: (row): CellValue => {
      const known = estimate(row)
      return known === null ? null : valueOf(known)
    },
    interval: (row): Interval | null => {
      const known = estimate(row)
      return known !== null && isInterval(known) ? known : null
    },
    lines: (row, context) => {
      const values = partValuesOf(row, part)
      return values && row.values ? about.lines(values, row.values, row, context) : []
    },
  }
}
