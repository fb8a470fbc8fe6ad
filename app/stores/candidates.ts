import type { Candidate, CandidateChange } from '#shared/schemas/candidates'
import type { StudyEvent } from '#shared/schemas/events'
import type { PartName, PartsRequest } from '#shared/schemas/parts'
import type { Sweep, SweepCreation } from '#shared/schemas/sweeps'
import type { ColumnContext } from '#shared/columns'
import { RowList, isNewer } from '~/utils/candidates/row-list'
import type { RowsChange } from '~/utils/candidates/row-list'
import { freeSlot } from '~/utils/candidates/pins'

type Page<T> = { items: T[], next: string | null }
/** The first page fills the screen, the others come in few requests. */
const firstPageSize = 200
const pageSize = 2000

/** Rows of the study whose Candidates page is open, kept in step with the server by its events. */
export const useCandidatesStore = defineStore('candidates', () => {
  const api = useApi()
  const study = useStudyStore()
  const list = new RowList()
  const listeners = new Set<(change: RowsChange) => void>()

  const studyId = ref('')
  const rows = shallowRef<readonly Candidate[]>([])
  /** rows that are pinned or the reference, which an edit of another row leaves alone */
  const marked = shallowRef<readonly Candidate[]>([])
  const loading = ref<{ rows: number } | null>(null)
  const loadError = ref<string | null>(null)
  const loaded = ref(false)
  const sweeps = shallowRef<readonly Sweep[]>([])
  const selectedId = ref<string | null>(null)
  /** pins of a reader who may not change the study's: this page's own */
  const ownPins = shallowRef<ReadonlyMap<string, number>>(new Map())
  /** rows that an event brought or removed while pages of rows were being read */
  let overtaken: Set<string> | null = null
  let reading = 0

  const tell = (change: RowsChange) => {
    if (!change.structure && change.ids.length === 0) return
    rows.value = list.rows
    marked.value = list.marked
    for (const listener of listeners) listener(change)
  }
  /** Calls back after every change of the rows, at once; @returns how to stop */
  const onRows = (listener: (change: RowsChange) => void) => {
    listeners.add(listener)
    return () => listeners.delete(listener)
  }

  const byId = (id: string) => list.get(id)
  const placeOf = (id: string) => list.placeOf(id)
  /** The same for what is drawn from a row and follows its changes. */
  const rowNow = (id: string) => rows.value.length > 0 ? list.get(id) : undefined
  const pinOf = (row: Candidate) => row.pin ?? ownPins.value.get(row.id) ?? null
  /** pinned by this page alone; their rows may change at any time */
  const pinnedHere = computed(() => ownPins.value.size === 0 || rows.value.length === 0
    ? []
    : [...ownPins.value].flatMap(([id, pin]): Candidate[] => {
        const row = list.get(id)
        return row && row.pin === null ? [{ ...row, pin }] : []
      }))
  const pinned = computed(() => [...marked.value.filter(row => row.pin !== null), ...pinnedHere.value].sort((a, b) => (a.pin ?? 0) - (b.pin ?? 0)))
  const selected = computed(() => (selectedId.value === null ? null : rowNow(selectedId.value) ?? null))
  const reference = computed(() => marked.value.find(row => row.inputs.role === 'reference') ?? null)
  const context = computed<ColumnContext>(() => ({ reference: reference.value, requirements: study.requirements }))
  const runningSweeps = computed(() => sweeps.value.filter(sweep => sweep.state === 'running'))

  /** Takes rows of an answer to a request of this page, unless an event has brought newer ones. */
  const adopt = (answer: readonly Candidate[]) => tell(list.put(answer.filter(row => isNewer(row, list.get(row.id)))))

  const pageOf = (id: string, limit: number, cursor?: string) =>
    api.get<Page<Candidate>>(`/api/studies/${id}/candidates`, { query: { limit, cursor } })

  /** Shows a study's first rows at once; `load` reads all of them when the study's events have begun to arrive. */
  const begin = async (id: string) => {
    if (studyId.value !== id) forget(id)
    const own = ++reading
    loading.value = { rows: 0 }
    loadError.value = null
    try {
      const { items } = await pageOf(id, firstPageSize)
      // Rows of a reading that has begun since are as new, and may be there already.
      if (studyId.value === id && !loaded.value) tell(list.put(items.filter(row => !list.get(row.id) && !overtaken?.has(row.id))))
    } catch (thrown) {
      if (own === reading) loadError.value = sentenceOf(thrown)
    }
  }

  /** Reads all rows of a study, a page at a time, and its sweeps; rows that are gone leave at the end. */
  const load = async (id: string) => {
    if (studyId.value !== id) forget(id)
    const own = ++reading
    const during = overtaken = new Set<string>()
    const seen = new Set<string>()
    loading.value = { rows: 0 }
    loadError.value = null
    try {
      let coming: Promise<Page<Candidate>> | null = pageOf(id, pageSize)
      const sweepsComing = readSweeps(id, () => own === reading)
      while (coming) {
        const page: Page<Candidate> = await coming
        if (own !== reading) return
        // The server gathers the next page while this one is taken in.
        coming = page.next ? pageOf(id, pageSize, page.next) : null
        coming?.catch(() => undefined)
        for (const row of page.items) seen.add(row.id)
        tell(list.put(page.items.filter(row => !during.has(row.id))))
        loading.value = { rows: seen.size }
      }
      await sweepsComing
      if (own !== reading) return
      tell(list.remove(list.rows.filter(row => !seen.has(row.id) && !during.has(row.id)).map(row => row.id)))
      loaded.value = true
    } catch (thrown) {
      if (own === reading) loadError.value = sentenceOf(thrown)
    } finally {
      if (own === reading) {
        loading.value = null
        overtaken = null
      }
    }
  }

  const readSweeps = async (id: string, wanted: () => boolean) => {
    const { items } = await api.get<Page<Sweep>>(`/api/studies/${id}/sweeps`)
    if (wanted()) sweeps.value = items
  }

  const forget = (id: string) => {
    studyId.value = id
    list.clear()
    sweeps.value = []
    ownPins.value = new Map()
    selectedId.value = null
    loaded.value = false
    tell({ structure: true, ids: [] })
  }

  /** What the study's stream says: rows as they are now, rows that are gone, sweeps, or a changed study. */
  const applyEvent = (event: StudyEvent) => {
    for (const id of [...event.rows?.map(row => row.id) ?? [], ...event.removed ?? []]) overtaken?.add(id)
    if (event.rows) tell(list.put(event.rows.filter(row => row.version >= (list.get(row.id)?.version ?? 0))))
    if (event.removed) tell(list.remove(event.removed))
    if (event.sweep) takeSweep(event.sweep)
    if (event.study && studyId.value) void study.load(studyId.value)
  }

  const takeSweep = (sweep: Sweep) => {
    sweeps.value = [...sweeps.value.filter(known => known.id !== sweep.id), sweep]
  }

  const url = (tail = '') => `/api/studies/${studyId.value}/candidates${tail}`

  /** Changes a row that is at `version`. @returns the version made of it @throws ApiProblem 409 when it no longer is, 422 with the fields' errors */
  const change = async (id: string, patch: CandidateChange, version: number) => {
    const changed = await api.patch<Candidate>(`/api/candidates/${id}`, patch, { version })
    adopt([changed])
    return changed.version
  }

  /** Makes rows behind another one (null: behind the last). @returns the new rows */
  const create = async (items: CandidateChange[], after: string | null = null) => {
    const made = await api.post<Page<Candidate>>(url(), { items, ...after ? { after } : {} })
    adopt(made.items)
    return made.items
  }
  const duplicate = async (ids: string[]) => {
    const made = await api.post<Page<Candidate>>(url('/duplicate'), { ids })
    adopt(made.items)
    return made.items
  }
  const remove = async (ids: string[]) => {
    await api.post(url('/delete'), { ids })
    tell(list.remove(ids))
  }
  const restore = async (ids: string[]) => {
    adopt((await api.post<Page<Candidate>>(url('/restore'), { ids })).items)
  }
  const move = async (ids: string[], after: string | null) => {
    adopt((await api.post<Page<Candidate>>(url('/move'), { ids, after })).items)
  }

  /** Pins a row to the overlay or takes it off; for those who may not edit, on this page alone. */
  const setPinned = async (id: string, pin: boolean) => {
    const row = list.get(id)
    if (!row) return
    if (study.canEdit) {
      await api.put(`/api/studies/${studyId.value}/pins`, { candidate: id, pinned: pin })
      return
    }
    const own = new Map(ownPins.value)
    own.delete(id)
    const slot = pin ? freeSlot(pinned.value.map(other => other.pin)) : null
    if (pin && slot === null) throw new RangeError('All twelve lines of the overlay are taken: unpin a row first.')
    if (slot !== null) own.set(id, slot)
    ownPins.value = own
    tell({ structure: false, ids: [id] })
  }

  /** Has a part of rows computed where it is missing; the rows follow as events. */
  const askParts = async (part: PartName, ids: string[]) => {
    await api.post(`/api/studies/${studyId.value}/parts`, { part, ids } satisfies PartsRequest)
  }

  const startSweep = async (definition: SweepCreation) => {
    takeSweep(await api.post<Sweep>(`/api/studies/${studyId.value}/sweeps`, definition))
  }
  const cancelSweep = async (id: string) => {
    await api.delete(`/api/sweeps/${id}`)
  }

  return {
    studyId, rows, loading, loadError, loaded, sweeps, runningSweeps, selectedId, selected, pinned, reference, context,
    byId, rowNow, placeOf, pinOf, onRows, begin, load, applyEvent, adopt, change, create, duplicate, remove, restore, move, setPinned, askParts, startSweep, cancelSweep,
  }
})
