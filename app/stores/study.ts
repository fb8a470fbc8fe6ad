import type { Study, StudyChange } from '#shared/schemas/studies'

/**
 * The study whose pages are open: read once, changed in one place.
 * Changes go out one after the other, each with the version that the one before it left, so that a page never collides with itself.
 */
export const useStudyStore = defineStore('study', () => {
  const api = useApi()
  const study = ref<Study | null>(null)
  const requirements = computed(() => study.value?.requirements ?? null)
  const canOwn = computed(() => study.value?.role === 'owner')
  const archived = computed(() => Boolean(study.value?.archivedAt))
  /** the role allows changes, once the study is in work */
  const mayEdit = computed(() => canOwn.value || study.value?.role === 'editor')
  const canEdit = computed(() => mayEdit.value && !archived.value)
  let queue: Promise<unknown> = Promise.resolve()

  /**
   * Reads a study; the answer is taken over if it is still wanted then.
   * @throws ApiProblem 404 when there is none, or none for this reader
   */
  const load = async (id: string, wanted = () => true) => {
    const read = await api.get<Study>(`/api/studies/${id}`)
    // An answer that was overtaken by a change of our own is older than what is shown.
    if (wanted() && (study.value?.id !== id || read.version >= study.value.version)) study.value = read
    return study.value
  }

  /** Takes over a newer copy, as a stale change or an event brings it. */
  const adopt = (newer: Study) => {
    study.value = newer
  }

  /**
   * Changes the study; the answer becomes the study shown.
   * @throws ApiProblem 409 with the server's copy as `current` when somebody else was first, 422 with the fields' errors
   */
  const change = (patch: StudyChange): Promise<Study> => {
    const run = async () => {
      if (!study.value) throw new Error('A study is loaded before it is changed')
      study.value = await api.patch<Study>(`/api/studies/${study.value.id}`, patch, { version: study.value.version })
      return study.value
    }
    const done = queue.then(run, run)
    queue = done
    return done
  }

  return { study, requirements, archived, mayEdit, canEdit, canOwn, load, adopt, change }
})
