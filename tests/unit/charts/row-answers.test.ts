import { effectScope, nextTick, shallowRef } from 'vue'
import { beforeEach, describe, expect, it } from 'vitest'
import type { Candidate } from '../../../shared/schemas/candidates'
import { useRowAnswers, withoutDrawing } from '../../../app/utils/charts/row-answers'
import { sampleRow } from '../columns/sample-row'

const row = (replaced: Partial<Candidate> = {}): Candidate => ({ ...sampleRow({}), id: 'a', ...replaced })

/** Rows that can be changed, and a server whose answers are given by hand. */
function watched(first: Candidate[]) {
  const rows = shallowRef(first)
  const asked: { id: string, signal: AbortSignal, answer: (value: string) => void, refuse: () => void }[] = []
  const answers = effectScope().run(() => useRowAnswers<string>(
    () => rows.value,
    ({ id }, signal) => new Promise((resolve, reject) => asked.push({ id, signal, answer: resolve, refuse: () => reject(new Error('Gone.')) })),
    thrown => (thrown as Error).message,
  ))!
  const set = async (next: Candidate[]) => {
    rows.value = next
    await nextTick()
  }
  const settled = async (act: () => void) => {
    act()
    await new Promise(resolve => setImmediate(resolve))
  }
  return { answers, asked, set, settled }
}

describe('answers for rows', () => {
  let bench: ReturnType<typeof watched>
  beforeEach(async () => {
    bench = watched([row()])
    await bench.settled(() => bench.asked[0]!.answer('first'))
  })

  it('are asked for once', () => expect(bench.asked.map(({ id }) => id)).toEqual(['a']))
  it('are fresh when they come', () => expect(bench.answers.value.get('a')).toMatchObject({ value: 'first', fresh: true }))
  it('stay, but not as fresh, while the row is computed', async () => {
    await bench.set([row({ version: 2, state: 'computing' })])
    expect(bench.answers.value.get('a')).toMatchObject({ value: 'first', fresh: false })
  })
  it('are asked for again when a changed row has been computed', async () => {
    await bench.set([row({ version: 2, state: 'computing' })])
    await bench.set([row({ version: 2 })])
    await bench.settled(() => bench.asked[1]!.answer('second'))
    expect(bench.answers.value.get('a')).toMatchObject({ value: 'second', fresh: true })
  })
  it('are asked for again when only the computation was repeated', async () => {
    await bench.set([row({ state: 'computing' })])
    await bench.set([row()])
    expect(bench.asked).toHaveLength(2)
  })
  it('on their way are not taken when the computation begins anew', async () => {
    await bench.set([row({ version: 2 })])
    await bench.set([row({ version: 2, state: 'computing' })])
    await bench.set([row({ version: 2 })])
    await bench.settled(() => bench.asked[1]!.answer('too early'))
    expect([bench.asked.length, bench.answers.value.get('a')?.value]).toEqual([3, 'first'])
  })
  it('that a newer change has overtaken are not taken', async () => {
    await bench.set([row({ version: 2 })])
    await bench.set([row({ version: 3 })])
    await bench.settled(() => bench.asked[1]!.answer('overtaken'))
    expect([bench.asked[1]!.signal.aborted, bench.answers.value.get('a')?.value]).toEqual([true, 'first'])
  })
  it('carry the refusal instead of a value', async () => {
    await bench.set([row({ version: 2 })])
    await bench.settled(() => bench.asked[1]!.refuse())
    expect(bench.answers.value.get('a')).toMatchObject({ value: null, refusal: 'Gone.' })
  })
  it('leave with their row', async () => {
    await bench.set([])
    expect(bench.answers.value.size).toBe(0)
  })
  it('are not asked for of a row that failed', async () => {
    await bench.set([row({ id: 'b', state: 'failed' })])
    expect(bench.asked).toHaveLength(1)
  })
})

describe('a row without a drawing', () => {
  it('is one entered by its values', () => expect(withoutDrawing(row({ inputs: { ...row().inputs, family: 'entered' } }))).toMatch(/^entered/))
  it('is not one that is being computed', () => expect(withoutDrawing(row({ state: 'computing' }))).toBeNull())
})
