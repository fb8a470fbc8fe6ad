import type { Candidate } from '#shared/schemas/candidates'
import type { PartName } from '#shared/schemas/parts'
import { keyOf, partsOf, settled, unasked } from './parts'

type Wanted = {
  /** columns that are shown */
  shown: () => readonly string[]
  /** columns by which rows are sorted or filtered: these need a part of every row */
  arranging: () => readonly string[]
  /** ids of the rows in sight */
  sight: () => readonly string[]
  /** sorts and filters again: the numbers that it waited for are there */
  arrange: () => void
}
const restMs = 120
const mostAtOnce = 10_000

/**
 * Asks for what is shown: parts of the rows in sight and the pinned ones, and of all rows where rows are arranged by them.
 * The numbers come as events of the rows.
 */
export function usePartRequests({ shown, arranging, sight, arrange }: Wanted) {
  const store = useCandidatesStore()
  const notices = useNoticesStore()
  const asked = new Set<string>()
  let waiting: ReturnType<typeof setTimeout> | undefined
  /** parts by which rows are to be arranged as soon as all have them */
  let unfinished: readonly PartName[] = []

  const rowsFor = (part: PartName, byAll: readonly PartName[]): readonly Candidate[] => {
    if (byAll.includes(part)) return store.rows
    const near = sight().flatMap(id => store.byId(id) ?? [])
    return [...new Map([...near, ...store.pinned].map(row => [row.id, row])).values()]
  }

  const ask = async (part: PartName, rows: readonly Candidate[]) => {
    for (const row of rows) asked.add(keyOf(row, part))
    try {
      for (let i = 0; i < rows.length; i += mostAtOnce) await store.askParts(part, rows.slice(i, i + mostAtOnce).map(row => row.id))
    } catch (thrown) {
      for (const row of rows) asked.delete(keyOf(row, part))
      notices.tell(sentenceOf(thrown), { tone: 'error' })
    }
  }

  const look = () => {
    waiting = undefined
    const byAll = partsOf(arranging())
    for (const part of new Set([...partsOf(shown()), ...byAll])) {
      const rows = unasked(rowsFor(part, byAll), part, asked)
      if (rows.length > 0) void ask(part, rows)
    }
    const before = unfinished
    unfinished = byAll.filter(part => !settled(store.rows, part))
    if (before.some(part => byAll.includes(part) && !unfinished.includes(part))) arrange()
  }
  const lookSoon = () => {
    waiting ??= setTimeout(look, restMs)
  }

  const stop = store.onRows(lookSoon)
  watch([shown, arranging, sight], lookSoon)
  onMounted(lookSoon)
  onScopeDispose(() => {
    stop()
    clearTimeout(waiting)
  })
}
