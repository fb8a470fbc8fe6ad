import { shallowRef, watch } from 'vue'

/**
 * A value that others follow once it has rested: while the reader goes from one to the next, nothing is done for those in between.
 * @param value what changes
 * @param restMs how long it stays the same before it counts, in milliseconds
 */
export function useRested<T>(value: () => T, restMs: number) {
  const rested = shallowRef(value())
  watch(value, (next, _, onCleanup) => {
    const timer = setTimeout(() => {
      rested.value = next
    }, restMs)
    onCleanup(() => clearTimeout(timer))
  })
  return rested
}
