/**
 * Where a value of the requirements stands: names and indices, and "#id" or "@kind" for the item of a list with that id or
 * of that kind, which stays the same item when others are added, removed or moved. Must-haves go by their kind: each is stated
 * once, while an ID is the reader's own text and may stand twice until it is corrected.
 */
export type Path = readonly (string | number)[]

const marks: Partial<Record<string, 'id' | 'kind'>> = { '#': 'id', '@': 'kind' }

const keyIn = (node: unknown, segment: string | number): string | number | undefined => {
  if (typeof segment !== 'string' || !Array.isArray(node)) return segment
  const field = marks[segment.charAt(0)]
  if (!field) return segment
  const index = node.findIndex((item: { id?: string, kind?: string }) => item[field] === segment.slice(1))
  return index < 0 ? undefined : index
}

const step = (node: unknown, segment: string | number): unknown => {
  const key = keyIn(node, segment)
  return key === undefined || node === null || typeof node !== 'object' ? undefined : (node as Record<string | number, unknown>)[key]
}

/** The value at a path; undefined where the path leads nowhere. */
export function readAt(root: unknown, path: Path): unknown {
  return path.reduce(step, root)
}

/** A copy of the root with the value at a path replaced; the root itself where the path leads nowhere. */
export function writeAt<T>(root: T, path: Path, value: unknown): T {
  const [segment, ...rest] = path
  if (segment === undefined) return value as T
  const key = keyIn(root, segment)
  if (key === undefined || root === null || typeof root !== 'object') return root
  const copy = (Array.isArray(root) ? [...root] : { ...root }) as Record<string | number, unknown>
  copy[key] = writeAt(copy[key], rest, value)
  return copy as T
}

/** The path as the API's errors write it: names and indices with dots between. */
export function dottedPath(root: unknown, path: Path): string {
  return path.map((segment, depth) => keyIn(readAt(root, path.slice(0, depth)), segment)).join('.')
}

/** Whether a path is another one or leads on from it. */
export function isWithin(path: Path, outer: Path): boolean {
  return outer.every((segment, depth) => path[depth] === segment)
}

/** Whether two values of the requirements say the same. */
export function sameValue(a: unknown, b: unknown): boolean {
  return JSON.stringify(a) === JSON.stringify(b)
}
