import { onScopeDispose, shallowRef, watch } from 'vue'
import type { Candidate } from '#shared/schemas/candidates'

/** What the server has said about a row's drawing. */
export type RowAnswer<T> = {
  /** state of the row that it belongs to */
  key: string
  value: T | null
  /** false while a newer one is awaited */
  fresh: boolean
  /** why there is none */
  refusal: string | null
}

const keyOf = (row: Candidate) => `${row.version} ${row.updatedAt}`

/** Why a row has nothing to draw, or null. */
export function withoutDrawing(row: Candidate): string | null {
  if (row.inputs.family === 'entered') return 'entered by its values, without points'
  if (row.state === 'failed') return 'the row cannot be computed'
  return null
}

/**
 * Reads something about each row from the server, again whenever a row's computation has ended anew. An older answer
 * stays, marked as not fresh, until the newer one is there.
 * @param rows whose answers are wanted; the others' are dropped
 * @param read asks the server; throws when it refuses
 * @param sentence of what was thrown
 */
export function useRowAnswers<T>(
  rows: () => readonly Candidate[],
  read: (row: Candidate, signal: AbortSignal) => Promise<T>,
  sentence: (thrown: unknown) => string,
) {
  const answers = shallowRef<ReadonlyMap<string, RowAnswer<T>>>(new Map())
  const running = new Map<string, AbortController>()
  const put = (id: string, answer: RowAnswer<T>) => {
    answers.value = new Map(answers.value).set(id, answer)
  }

  const ask = async (row: Candidate, key: string) => {
    running.get(row.id)?.abort()
    const controller = new AbortController()
    running.set(row.id, controller)
    put(row.id, { key, value: answers.value.get(row.id)?.value ?? null, fresh: false, refusal: null })
    try {
      const value = await read(row, controller.signal)
      if (!controller.signal.aborted) put(row.id, { key, value, fresh: true, refusal: null })
    } catch (thrown) {
      if (!controller.signal.aborted) put(row.id, { key, value: null, fresh: true, refusal: sentence(thrown) })
    }
  }

  const settle = (wanted: readonly Candidate[]) => {
    const kept = new Map([...answers.value].filter(([id]) => wanted.some(row => row.id === id && !withoutDrawing(row))))
    for (const [id, controller] of running) {
      if (kept.has(id)) continue
      controller.abort()
      running.delete(id)
    }
    for (const row of wanted) {
      const answer = kept.get(row.id)
      // Before its computation ends a changed row has an older state's drawing at best, and so has an answer on its way.
      if (!answer || (row.state !== 'computing' && answer.key === keyOf(row))) continue
      running.get(row.id)?.abort()
      kept.set(row.id, { ...answer, key: '', fresh: false })
    }
    answers.value = kept
    for (const row of wanted) {
      if (row.state === 'computed' && !withoutDrawing(row) && kept.get(row.id)?.key !== keyOf(row)) void ask(row, keyOf(row))
    }
  }
  watch(() => rows().map(row => [row.id, row.state, row.inputs.family, keyOf(row)].join(' ')).join('\n'), () => settle(rows()), { immediate: true })
  onScopeDispose(() => running.forEach(controller => controller.abort()))
  return answers
}
