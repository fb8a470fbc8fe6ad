import { z } from 'zod'
import { name } from '#shared/schemas/common'
import { columnOf, columns } from '#shared/columns'

const stored = z.array(z.object({ id: z.string(), width: z.number().min(20).max(2000).optional() }))
const named = z.record(z.string(), stored)

/** The columns shown, in their order, with the widths that the reader gave. */
export type ColumnSet = { id: string, width?: number }[]

/** What a reader may call a set of columns. */
export const setName = name('a name for the set of columns', 40)

const setKey = 'halfplane.candidates.columns'
const namedKey = 'halfplane.candidates.column-sets'

/** What the page opens with before the reader has chosen. */
export const firstOpening = (): ColumnSet => columns.filter(column => column.firstOpening).map(({ id }) => ({ id }))

/** Columns that exist today; Name always leads, for it tells the rows apart. */
export function repaired(set: ColumnSet): ColumnSet {
  const rest = set.filter(({ id }, index) => id !== 'name' && columnOf(id) && set.findIndex(other => other.id === id) === index)
  return [set.find(({ id }) => id === 'name') ?? { id: 'name' }, ...rest]
}

function read<T>(key: string, schema: z.ZodType<T>): T | null {
  try {
    const parsed = schema.safeParse(JSON.parse(localStorage.getItem(key) ?? 'null'))
    return parsed.success ? parsed.data : null
  } catch {
    // Storage may be closed to the page, or hold what another program wrote: the reader then starts afresh.
    return null
  }
}

function write(key: string, value: unknown) {
  try {
    localStorage.setItem(key, JSON.stringify(value))
  } catch {
    // A full or closed storage costs the memory of the columns, nothing else.
  }
}

export const rememberedSet = (): ColumnSet => repaired(read(setKey, stored) ?? firstOpening())
export const rememberSet = (set: ColumnSet) => write(setKey, set)
/** Sets that the reader has named, by name. */
export const namedSets = (): Record<string, ColumnSet> => read(namedKey, named) ?? {}
export const keepNamedSets = (sets: Record<string, ColumnSet>) => write(namedKey, sets)

/** Adds a column where it stands among all columns, or takes it away. */
export function withColumn(set: ColumnSet, id: string, shown: boolean): ColumnSet {
  if (!shown) return repaired(set.filter(column => column.id !== id))
  if (set.some(column => column.id === id)) return set
  const order = new Map(columns.map((column, index) => [column.id, index]))
  const before = set.findLastIndex(column => (order.get(column.id) ?? 0) < (order.get(id) ?? 0))
  return repaired([...set.slice(0, before + 1), { id }, ...set.slice(before + 1)])
}
