import type { Candidate } from '#shared/schemas/candidates'
import { arrange, keepArranged } from './arrange'
import type { Filter, Sort } from './arrange'

const bulkMs = 250

/**
 * Which rows are shown and in what order. Rows keep their places while they change,
 * until the reader sorts or filters again; new rows come in behind their predecessors.
 */
export function useArrangement() {
  const store = useCandidatesStore()
  const sort = ref<Sort | null>(null)
  const filters = ref<Filter[]>([])
  const order = shallowRef<string[]>([])
  let hidden: ReadonlySet<string> = new Set()
  let waiting: ReturnType<typeof setTimeout> | undefined
  let last = 0

  /** Sorts and filters by the values as they are now. */
  const arrangeNow = () => {
    order.value = arrange(store.rows, sort.value, filters.value, store.context).map(row => row.id)
    const shown = new Set(order.value)
    hidden = shown.size === store.rows.length ? new Set() : new Set(store.rows.filter(row => !shown.has(row.id)).map(row => row.id))
  }

  const follow = () => {
    last = performance.now()
    waiting = undefined
    if (sort.value === null && filters.value.length === 0) arrangeNow()
    else order.value = keepArranged(order.value, hidden, store.rows)
  }

  // A sweep brings rows many times a second: the grid takes them over a few times a second.
  const stop = store.onRows(({ structure }) => {
    if (!structure || waiting) return
    const due = last + bulkMs - performance.now()
    if (due <= 0) follow()
    else waiting = setTimeout(follow, due)
  })
  onScopeDispose(() => {
    stop()
    clearTimeout(waiting)
  })

  /** Rising, falling, then the study's order again. */
  const sortBy = (column: string) => {
    const now = sort.value
    sort.value = now?.column !== column ? { column, descending: false } : now.descending ? null : { column, descending: true }
    arrangeNow()
  }
  const setSort = (next: Sort | null) => {
    sort.value = next
    arrangeNow()
  }
  const setFilters = (next: Filter[]) => {
    filters.value = next
    arrangeNow()
  }
  /** The rows shown, as they are now: their content changes without their order, so nothing of it is kept. */
  const shownRows = () => order.value.flatMap((id): Candidate[] => {
    const row = store.byId(id)
    return row ? [row] : []
  })

  arrangeNow()
  return { sort, filters, order, shownRows, sortBy, setSort, setFilters, arrangeNow }
}
export type Arrangement = ReturnType<typeof useArrangement>
