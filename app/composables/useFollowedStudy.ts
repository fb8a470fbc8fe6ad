/**
 * Keeps the study that is shown in step with what others change. A newer copy is taken over only while nothing is unsaved:
 * what the reader has typed stays, and saving it is then refused as stale, with both values.
 * @param settled everything the reader has changed is saved
 * @returns the state of the connection
 */
export function useFollowedStudy(studyId: string, settled: Readonly<Ref<boolean>>) {
  const store = useStudyStore()
  let behind = false

  const catchUp = async () => {
    if (!behind || !settled.value) return
    behind = false
    try {
      await store.load(studyId, () => settled.value)
      if (!settled.value) behind = true
    } catch {
      // The page says that the connection is lost, and has everything read again when it is back.
      behind = true
    }
  }
  const follow = () => {
    behind = true
    void catchUp()
  }
  watch(settled, catchUp)

  const { state } = useStudyEvents(studyId, {
    onEvent: (event) => {
      if (event.study) follow()
    },
    onStart: () => undefined,
    onReload: follow,
  })
  return state
}
