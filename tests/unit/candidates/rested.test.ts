import { afterEach, beforeEach, expect, it, vi } from 'vitest'
import { effectScope, nextTick, ref } from 'vue'
import { useRested } from '~/utils/candidates/rested'

beforeEach(() => void vi.useFakeTimers())
afterEach(() => void vi.useRealTimers())

/** A value and what rests of it after 150 ms, with the values that came to rest. */
function resting() {
  const value = ref('a')
  const scope = effectScope()
  const rested = scope.run(() => useRested(() => value.value, 150))!
  const set = async (next: string) => {
    value.value = next
    await nextTick()
  }
  return { rested, set, stop: () => scope.stop() }
}

it('begins with the value as it is', () => expect(resting().rested.value).toBe('a'))

it('keeps the old value until the new one has rested', async () => {
  const { rested, set } = resting()
  await set('b')
  vi.advanceTimersByTime(149)
  expect(rested.value).toBe('a')
  vi.advanceTimersByTime(1)
  expect(rested.value).toBe('b')
})

it('passes over a value that another follows before it has rested', async () => {
  const { rested, set } = resting()
  await set('b')
  vi.advanceTimersByTime(100)
  await set('c')
  vi.advanceTimersByTime(100)
  expect(rested.value).toBe('a')
  vi.advanceTimersByTime(50)
  expect(rested.value).toBe('c')
})

it('changes no more once its user has gone', async () => {
  const { rested, set, stop } = resting()
  await set('b')
  stop()
  vi.advanceTimersByTime(150)
  expect(rested.value).toBe('a')
})
