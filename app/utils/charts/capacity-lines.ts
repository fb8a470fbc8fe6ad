import type { CurveRow, Place } from './curves'
import { capacity } from './quantities'
import type { View } from './view'

/** Capacity against Es/N0, once for each number of dimensions among the rows, over the SNR in view. */
export function capacityLines(rows: readonly CurveRow[], { x: [from, to] }: View): { id: string, text: string, line: Place[] }[] {
  const dimensions = [...new Set(rows.flatMap(row => row.dimensions ?? []))].sort((a, b) => a - b)
  return dimensions.map(n => ({
    id: String(n),
    text: dimensions.length === 1 ? 'capacity' : `capacity, N = ${n}`,
    line: Array.from({ length: 201 }, (_, i): Place => {
      const esN0Db = from + (to - from) * i / 200
      return [esN0Db, capacity(n, esN0Db)]
    }),
  }))
}
