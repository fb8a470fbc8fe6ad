import type { Study, StudySummary } from '#shared/schemas/studies'

/**
 * What can be done to a study from the list. Each action tells what it did, offers the way back where there is one,
 * and has the list read again; a refusal becomes a notice.
 * @param refresh reads the list again
 */
export function useStudyActions(refresh: () => Promise<unknown>) {
  const api = useApi()
  const notices = useNoticesStore()

  const attempt = async (action: () => Promise<unknown>) => {
    try {
      await action()
    } catch (thrown) {
      notices.tell(sentenceOf(thrown), { tone: 'error' })
    }
    await refresh()
  }

  const restore = async (study: Pick<StudySummary, 'id' | 'name'>) => {
    await api.post(`/api/studies/${study.id}/restore`)
    notices.tell(`“${study.name}” is back.`)
    await refresh()
  }

  const archive = (study: StudySummary, archived: boolean): Promise<void> => attempt(async () => {
    const { version } = await api.patch<Study>(`/api/studies/${study.id}`, { archived }, { version: study.version })
    notices.tell(archived ? `“${study.name}” is archived.` : `“${study.name}” is in work again.`, {
      undo: () => archive({ ...study, version }, !archived),
    })
  })

  const remove = (study: StudySummary) => attempt(async () => {
    await api.delete(`/api/studies/${study.id}`, { version: study.version })
    notices.tell(`“${study.name}” is deleted.`, { undo: () => restore(study) })
  })

  return { archive, remove, restore: (study: StudySummary) => attempt(() => restore(study)) }
}
