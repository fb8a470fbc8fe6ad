import type { Candidate } from '#shared/schemas/candidates'

const many = (count: number) => count === 1 ? '1 row' : `${count.toLocaleString('en-GB')} rows`

/** What the page's commands act on, and how it shows what came of them. */
type Page = {
  /** the rows to act on, in the order shown */
  targets: () => string[]
  focusCell: (row: string) => void
  selectOnly: (ids: string[]) => void
}

/** The commands on rows; what goes wrong becomes a notice. */
export function useRowCommands({ targets, focusCell, selectOnly }: Page) {
  const store = useCandidatesStore()
  const notices = useNoticesStore()
  const busy = ref(false)

  const attempt = async (action: () => Promise<void>) => {
    busy.value = true
    try {
      await action()
    } catch (thrown) {
      notices.tell(thrown instanceof RangeError ? thrown.message : sentenceOf(thrown), { tone: 'error' })
    } finally {
      busy.value = false
    }
  }

  /** The grid takes new rows over in the next turn. */
  const show = async (rows: readonly Candidate[]) => {
    await nextTick()
    selectOnly(rows.map(row => row.id))
    const [first] = rows
    if (first) focusCell(first.id)
  }

  const add = () => attempt(async () => {
    const last = targets().at(-1) ?? null
    await show(await store.create([{}], last))
  })

  const duplicate = () => attempt(async () => {
    const ids = targets()
    if (ids.length > 0) await show(await store.duplicate(ids))
  })

  const remove = () => attempt(async () => {
    const ids = targets()
    if (ids.length === 0) return
    await store.remove(ids)
    notices.tell(`${many(ids.length)} deleted.`, { undo: () => store.restore(ids) })
  })

  /** Moves the selected rows past the row above or below them, in the study's order. */
  const move = (down: boolean) => attempt(async () => {
    const chosen = new Set(targets())
    const all = store.rows.map(row => row.id)
    const ids = all.filter(id => chosen.has(id))
    if (ids.length === 0) return
    const rest = all.filter(id => !chosen.has(id))
    const [first, last] = [all.indexOf(ids[0] ?? ''), all.indexOf(ids.at(-1) ?? '')]
    const before = rest.filter(id => all.indexOf(id) < (down ? last : first)).length
    const at = down ? Math.min(rest.length, before + 1) : Math.max(0, before - 1)
    await store.move(ids, rest[at - 1] ?? null)
  })

  const isPinned = (id: string) => {
    const row = store.byId(id)
    return row ? store.pinOf(row) !== null : false
  }
  /** Pins the rows, or unpins them when all of them are pinned. */
  const pin = () => attempt(async () => {
    const ids = targets()
    const on = !ids.every(isPinned)
    for (const id of ids.filter(id => isPinned(id) !== on)) await store.setPinned(id, on)
  })

  return { busy, add, duplicate, remove, move, pin }
}
