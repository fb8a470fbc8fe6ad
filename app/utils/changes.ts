/** One thing that differs between two states: where, and what it was and is (null: was or is not there). */
export type Change = { what: string, from: string | null, to: string | null }

const shown = (value: unknown): string | null => {
  if (value === undefined || value === null || value === '') return null
  return typeof value === 'number' ? decimalText(value) : typeof value === 'string' ? value : JSON.stringify(value)
}

const isObject = (value: unknown): value is Record<string, unknown> => typeof value === 'object' && value !== null

const words = (key: string) => key.replace(/([a-z])([A-Z])/g, '$1 $2').toLowerCase()

/**
 * What differs between two states of something, value by value, however deep they are nested.
 * @param limit at most so many; the last one then says that there are more
 */
export function changesOf(from: unknown, to: unknown, limit = 12): Change[] {
  const found: Change[] = []
  const compare = (a: unknown, b: unknown, path: readonly string[]) => {
    if (JSON.stringify(a) === JSON.stringify(b)) return
    if ((isObject(a) || isObject(b)) && (isObject(a) || a === undefined || a === null) && (isObject(b) || b === undefined || b === null)) {
      const keys = new Set([...Object.keys(a ?? {}), ...Object.keys(b ?? {})])
      for (const key of keys) compare((a as Record<string, unknown> | undefined)?.[key], (b as Record<string, unknown> | undefined)?.[key], [...path, words(key)])
    } else {
      const change = { what: path.join(' · '), from: shown(a), to: shown(b) }
      if (change.from !== change.to) found.push(change)
    }
  }
  compare(from, to, [])
  return found.length > limit
    ? [...found.slice(0, limit), { what: `and ${found.length - limit} more`, from: null, to: null }]
    : found
}
