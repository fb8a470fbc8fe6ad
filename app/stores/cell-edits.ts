import type { Candidate, CandidateChange } from '#shared/schemas/candidates'
import { candidateChange } from '#shared/schemas/candidates'
import { inputIssues } from '#shared/study'
import type { InputColumn } from '#shared/columns'
import { columnOf } from '#shared/columns'
import { EditQueue } from '~/utils/candidates/edit-queue'
import { RowVersions } from '~/utils/candidates/row-versions'
import { cellKey, isCandidate, partsOf, touchesNumbers } from '~/utils/candidates/cell-saves'
import type { CellKey, CellSave } from '~/utils/candidates/cell-saves'

const staleSentence = 'Somebody else changed this row first. Your value is not saved.'

/** The sentence against a change, by the same rules as the server's: limits of its fields, and contradictions at them. */
function sentenceAgainst(row: Candidate, change: CandidateChange): string | null {
  const parsed = candidateChange.safeParse(change)
  if (!parsed.success) return parsed.error.issues[0]?.message ?? 'This value is not allowed.'
  const fields = Object.keys(parsed.data)
  return inputIssues({ ...row.inputs, ...parsed.data }).find(issue => fields.includes(issue.path.split('.')[0] ?? ''))?.message ?? null
}

/**
 * Edits of cells on their way to the server. Nothing looks saved before the server says so; what is refused, outrun or lost
 * keeps the typed text and says why.
 */
export const useCellEditsStore = defineStore('cell-edits', () => {
  const candidates = useCandidatesStore()
  const queue = new EditQueue()
  const versions = new RowVersions()
  const saves = new Map<CellKey, CellSave>()
  /** edits under way a row that its numbers depend on */
  const stale = new Map<string, number>()
  const listeners = new Set<(row: string, column: string) => void>()
  /** counts changes of the cells' states, for what is drawn from them */
  const changes = ref(0)

  const announce = (key: CellKey) => {
    changes.value++
    const { row, column } = partsOf(key)
    for (const listener of listeners) listener(row, column)
  }
  const set = (key: CellKey, save: CellSave | null) => {
    if (save) saves.set(key, save)
    else saves.delete(key)
    announce(key)
  }
  const onCell = (listener: (row: string, column: string) => void) => {
    listeners.add(listener)
    return () => listeners.delete(listener)
  }

  const saveOf = (row: string, column: string) => saves.get(cellKey(row, column)) ?? null
  /** Whether an edit under way makes the row's numbers out of date. */
  const isStale = (row: string) => (stale.get(row) ?? 0) > 0
  /** Cells whose typed text is not what the server holds. */
  const unsaved = computed(() => changes.value >= 0 ? [...saves.keys()].map(partsOf).filter(({ row }) => candidates.byId(row)) : [])

  const fail = (key: CellKey, column: InputColumn, text: string, change: CandidateChange, thrown: unknown) => {
    if (!(thrown instanceof ApiProblem)) {
      set(key, { state: 'failed', text, change, sentence: sentenceOf(thrown) })
      return
    }
    const { row } = partsOf(key)
    // Without a row beside it, 409 is the study's state: it is archived.
    if (thrown.status === 409 && isCandidate(thrown.current)) {
      candidates.adopt([thrown.current])
      const theirs = candidates.byId(row)
      set(key, { state: 'conflict', text, change, theirs: theirs ? column.text(theirs.inputs) : '', sentence: staleSentence })
    } else if (thrown.status === 422) {
      const sentence = thrown.errors.find(error => column.fields.some(field => error.path.split('.')[0] === field))?.message ?? thrown.detail
      set(key, { state: 'refused', text, sentence })
    } else {
      set(key, { state: 'failed', text, change, sentence: `${thrown.detail} Your value is not saved.` })
    }
  }

  /** @param seen version of the row that was shown when the value was entered */
  const send = async (row: string, column: InputColumn, text: string, change: CandidateChange, seen: number) => {
    const key = cellKey(row, column.id)
    const own: CellSave = { state: 'saving', text }
    const numbers = touchesNumbers(change) ? 1 : 0
    stale.set(row, (stale.get(row) ?? 0) + numbers)
    set(key, own)
    await queue.run(row, async () => {
      try {
        const base = versions.baseOf(row, seen)
        versions.saved(row, base, await candidates.change(row, change, base))
        // A later edit of the same cell may have taken this one's place.
        if (saves.get(key) === own) saves.delete(key)
      } catch (thrown) {
        if (saves.get(key) === own) fail(key, column, text, change, thrown)
      }
      stale.set(row, (stale.get(row) ?? 0) - numbers)
      announce(key)
    })
  }

  /**
   * Takes what was typed into a cell.
   * @param before the row as it was when the editor opened: a value that has changed since is not overwritten unseen
   */
  const edit = async (row: string, column: InputColumn, text: string, before: Candidate | null = null) => {
    const key = cellKey(row, column.id)
    const now = candidates.byId(row)
    if (!now) return
    const shown = column.text(now.inputs)
    if (text.trim() === shown.trim() && !saves.has(key)) return
    const entry = column.parse(text, now.inputs)
    if ('refused' in entry) {
      set(key, { state: 'refused', text, sentence: entry.refused })
      return
    }
    const sentence = sentenceAgainst(now, entry.change)
    if (sentence) {
      set(key, { state: 'refused', text, sentence })
    } else if (before && column.text(before.inputs) !== shown && !saves.has(key)) {
      set(key, { state: 'conflict', text, change: entry.change, theirs: shown, sentence: staleSentence })
    } else {
      await send(row, column, text, entry.change, now.version)
    }
  }

  const inputColumn = (id: string) => {
    const column = columnOf(id)
    return column?.kind === 'input' ? column : null
  }
  /** Sends a typed value once more: after a conflict over the other's value, after a failure as it was. */
  const keepMine = async (row: string, columnId: string) => {
    const [save, column, now] = [saveOf(row, columnId), inputColumn(columnId), candidates.byId(row)]
    if (column && now && (save?.state === 'conflict' || save?.state === 'failed')) await send(row, column, save.text, save.change, now.version)
  }
  /** Gives a typed value up: the cell shows what the server holds. */
  const takeTheirs = (row: string, columnId: string) => set(cellKey(row, columnId), null)

  return { changes, unsaved, onCell, saveOf, isStale, edit, keepMine, takeTheirs }
})
