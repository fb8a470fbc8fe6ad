/** A sentence shown at the foot of every page for a while, with one way to take back what happened. */
export type Notice = { id: number, sentence: string, tone: 'status' | 'error', undo?: () => Promise<unknown> }

const shownMs = 12_000

export const useNoticesStore = defineStore('notices', () => {
  const notices = ref<Notice[]>([])
  let last = 0

  const dismiss = (id: number) => {
    notices.value = notices.value.filter(notice => notice.id !== id)
  }

  /** Shows a sentence; with `undo` it stays until it is dismissed or taken back. */
  const tell = (sentence: string, { tone = 'status', undo }: { tone?: Notice['tone'], undo?: Notice['undo'] } = {}) => {
    const id = ++last
    notices.value = [...notices.value.slice(-2), { id, sentence, tone, undo }]
    if (!undo && tone === 'status') setTimeout(() => dismiss(id), shownMs)
  }

  /** Takes back what a notice tells of; a refusal becomes a notice of its own. */
  const takeBack = async (notice: Notice) => {
    dismiss(notice.id)
    try {
      await notice.undo?.()
    } catch (thrown) {
      tell(sentenceOf(thrown), { tone: 'error' })
    }
  }

  return { notices, tell, dismiss, takeBack }
})
