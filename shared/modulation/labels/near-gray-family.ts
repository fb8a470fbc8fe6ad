import { familyOf } from '../families'
import type { FamilyId, FamilyParameters } from '../families'
import { foldedWords } from './cross'
import { grayWord } from './gray'
import { halvedWords } from './halves'
import { nearGrayWords, sortedIntoColumns } from './near-gray'

/** Members of families whose labels take a search are kept, so many at most: their labels depend on little. */
const keptAtMost = 64
const kept = new Map<string, Uint16Array>()

/**
 * Near-Gray labels of a family's points by search from a Gray-labelled division into columns and, for rings, into rings and sectors.
 * @param id the family
 * @param parameters valid; M is a power of two
 */
export function searchedWords(id: FamilyId, parameters: FamilyParameters): Uint16Array {
  const used = id === 'apsk' ? evenRings(parameters) : parameters
  const family = familyOf(id)
  const key = JSON.stringify([id, ...family.parameters.map(name => used[name] ?? null)])
  const known = kept.get(key)
  if (known) return known
  const points = family.points(used)
  const words = nearGrayWords(points, startsOf(id, points))
  if (kept.size >= keptAtMost) kept.delete(kept.keys().next().value!)
  kept.set(key, words)
  return words
}

/** Rings with the same distance between neighbours on the first and from ring to ring: labels do not jump when a ratio moves. */
function evenRings({ rings, phases }: FamilyParameters): FamilyParameters {
  const first = rings!.findIndex(n => n > 1)
  const step = rings![first]! > 2 ? 2 * Math.sin(Math.PI / rings![first]!) : 1
  return { rings, phases, ratios: rings!.slice(first + 1).map((_, q) => 1 + step * (q + 1)) }
}

/** Labels to begin with, by family: all are Gray along two coordinates of their own. */
function startsOf(id: FamilyId, points: number[][]): number[][] {
  if (id === 'cross-qam') return [foldedWords(points)]
  if (points[0]!.length > 2) return [halvedWords(points)]
  const rows = 2 ** Math.floor(Math.log2(points.length) / 2)
  const columns = points.length / rows
  const starts = [sortedIntoColumns(points, columns, (column, row) => grayWord(column) * rows + grayWord(row))]
  if (id === 'apsk') {
    const polar = points.map(([x, y]) => [Number(Math.hypot(x!, y!).toPrecision(9)), Math.atan2(y!, x!)])
    starts.push(sortedIntoColumns(polar, rows, (ring, sector) => grayWord(ring) * columns + grayWord(sector)))
  }
  return starts
}
