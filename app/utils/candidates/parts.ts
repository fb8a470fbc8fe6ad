import type { Candidate } from '#shared/schemas/candidates'
import type { PartName } from '#shared/schemas/parts'
import { columnOf } from '#shared/columns'

const partOfColumn = (id: string): PartName | null => {
  const column = columnOf(id)
  return column?.kind === 'computed' ? column.part ?? null : null
}

/** Parts of columns, each once. */
export const partsOf = (columns: readonly string[]): PartName[] => [...new Set(columns.flatMap(id => partOfColumn(id) ?? []))]

/** Whether a row can have parts: one that is computed and has points. */
const hasParts = (row: Candidate) => row.state === 'computed' && row.inputs.family !== 'entered'

/** What a row is asked for at most once: a part of it as it is now. */
export const keyOf = (row: Candidate, part: PartName) => `${part} ${row.id} ${row.version} ${row.updatedAt}`

/** Rows that have not been asked for a part yet and would have it computed. */
export function unasked(rows: readonly Candidate[], part: PartName, asked: ReadonlySet<string>): Candidate[] {
  return rows.filter(row => hasParts(row) && row.parts[part] === undefined && !asked.has(keyOf(row, part)))
}

/** Whether every row that can have a part has it, or has failed to. */
export const settled = (rows: readonly Candidate[], part: PartName) =>
  rows.every(row => row.state !== 'computing' && (!hasParts(row) || (row.parts[part]?.state ?? 'computing') !== 'computing'))
