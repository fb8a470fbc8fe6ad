/**
 * State of a form that is sent as a whole: busy while it is under way, and the problem that came back.
 * A thrown thing that is no answer of the API becomes a problem with a sentence, so that no failure passes silently.
 */
export function useForm() {
  const busy = ref(false)
  const problem = ref<ApiProblem | null>(null)

  /** @returns whether it went through */
  const attempt = async (action: () => Promise<unknown>): Promise<boolean> => {
    busy.value = true
    problem.value = null
    try {
      await action()
      return true
    } catch (thrown) {
      problem.value = thrown instanceof ApiProblem ? thrown : new ApiProblem(0, { detail: sentenceOf(thrown) })
      return false
    } finally {
      busy.value = false
    }
  }

  return { busy, problem, attempt }
}
