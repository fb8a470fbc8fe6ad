import type { StudyEvent } from '#shared/schemas/events'
import type { Search, SearchCreation } from '#shared/schemas/searches'
import { searchOutcome } from '~/utils/candidates/search-words'

/** How long a stopped search is offered to go on, from its last step. */
const offeredMs = 24 * 3_600_000

/** Searches of the study whose Candidates page is open: what runs, what stopped, and a word at the end of each. */
export const useSearchesStore = defineStore('searches', () => {
  const api = useApi()
  const notices = useNoticesStore()
  const candidates = useCandidatesStore()
  const searches = shallowRef<readonly Search[]>([])
  const dismissed = ref<ReadonlySet<string>>(new Set())

  const isUnderWay = ({ state }: Search) => state === 'queued' || state === 'running'
  const isOffered = ({ state, updatedAt }: Search) => (state === 'cancelled' || state === 'failed') && Date.now() - Date.parse(updatedAt) < offeredMs
  /** those that have something to say: under way, or stopped not long ago */
  const shown = computed(() => searches.value.filter(search => !dismissed.value.has(search.id) && (isUnderWay(search) || isOffered(search))))

  const take = (search: Search) => {
    const before = searches.value.find(({ id }) => id === search.id)
    if (before && isUnderWay(before) && search.state === 'done') notices.tell(searchOutcome(search, candidates.byId(search.candidateId)?.inputs.name ?? null))
    searches.value = [...searches.value.filter(({ id }) => id !== search.id), search]
  }

  /** Reads the study's searches. */
  const load = async (studyId: string) => {
    try {
      const { items } = await api.get<{ items: Search[] }>(`/api/studies/${studyId}/searches`)
      if (candidates.studyId === studyId) searches.value = items
    } catch (thrown) {
      notices.tell(sentenceOf(thrown), { tone: 'error' })
    }
  }
  const applyEvent = ({ job }: StudyEvent) => {
    if (job) take(job)
  }

  /** @throws ApiProblem 422 with what the row or the search lacks */
  const start = async (candidateId: string, definition: SearchCreation) => {
    take(await api.post<Search>(`/api/candidates/${candidateId}/searches`, definition))
  }
  const attempt = async (ask: () => Promise<Search>) => {
    try {
      take(await ask())
    } catch (thrown) {
      notices.tell(sentenceOf(thrown), { tone: 'error' })
    }
  }
  const cancel = (id: string) => attempt(() => api.delete<Search>(`/api/searches/${id}`))
  const resume = (id: string) => attempt(() => api.post<Search>(`/api/searches/${id}/resume`))
  const dismiss = (id: string) => {
    dismissed.value = new Set([...dismissed.value, id])
  }

  return { searches, shown, load, applyEvent, start, cancel, resume, dismiss, isUnderWay }
})
