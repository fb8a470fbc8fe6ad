import { beforeAll, describe, expect, it } from 'vitest'
import type { Candidate } from '#shared/schemas/candidates'
import type { CandidateConstellation, CandidateCurves } from '#shared/schemas/values'
import { signIn } from '../support/client'
import type { Client } from '../support/client'
import { allRows, change, ownRow, ownStudy, Stream } from './own-study'
import type { Refused, Rows } from './own-study'

let owner: Client
let study: string

beforeAll(async () => {
  owner = await signIn('owner')
  study = await ownStudy(owner, 'Rows')
})

const computed = async (row: Candidate): Promise<Candidate> => {
  const stream = await Stream.open(owner, row.studyId)
  const now = (await owner.get<Candidate>(`/api/candidates/${row.id}`)).body
  if (now.state === 'computing') await stream.until(() => (stream.rows.get(row.id)?.state ?? 'computing') !== 'computing')
  await stream.close()
  return (await owner.get<Candidate>(`/api/candidates/${row.id}`)).body
}

describe('creating rows', () => {
  it('names a row after its family', async () => expect((await ownRow(owner, study, { family: 'psk', order: 8 })).inputs.name).toBe('8-PSK'))
  it('computes a row', async () =>
    expect((await computed(await ownRow(owner, study))).values!.requiredEsN0Db).toBeCloseTo(20.918, 3))
  it('answers many rows in the order given', async () => {
    const { body } = await owner.post<Rows>(`/api/studies/${study}/candidates`, { items: [{ order: 4 }, { order: 64 }] })
    expect(body.items.map(row => row.inputs.name)).toEqual(['4-QAM', '64-QAM'])
  })
  it('places rows behind another one', async () => {
    const own = await ownStudy(owner, 'Places')
    const first = await ownRow(owner, own, { name: 'first' })
    await ownRow(owner, own, { name: 'last' })
    await owner.post(`/api/studies/${own}/candidates`, { items: [{ name: 'between' }, { name: 'between too' }], after: first.id })
    expect((await allRows(owner, own)).map(row => row.inputs.name)).toEqual(['first', 'between', 'between too', 'last'])
  })
  it('writes nothing when one of many rows is wrong', async () => {
    const own = await ownStudy(owner, 'Whole or not at all')
    const { status, body } = await owner.post<Refused>(`/api/studies/${own}/candidates`, { items: [{ order: 16 }, { order: 24 }] })
    expect([status, body.errors]).toEqual([422, [{ path: 'items.1.order', message: 'QAM has a power of two of points from 4 to 4096.' }]])
    expect(await allRows(owner, own)).toEqual([])
  })
})

describe('bad input', () => {
  const bad: [string, object, string][] = [
    ['an order that a family cannot have', { family: 'cross-qam', order: 64 }, 'order'],
    ['coincident points', { family: 'custom', points: [[1, 0], [0, 1], [1, 0]] }, 'points.2'],
    ['a string where a number belongs', { order: '16' }, 'order'],
    ['a number out of range', { rollOff: 2 }, 'rollOff'],
    ['an SNR range that runs backwards', { snrStart: 10, snrStop: 0 }, 'snrStop'],
    ['an SNR range of more than 1,001 values', { snrStep: 0.001 }, 'snrStep'],
    ['an unknown field', { colour: 'red' }, 'colour'],
    ['a code rate below 1 with an uncoded basis', { codeRate: 0.75 }, 'codeRate'],
    ['a missing spacing', { normalisation: 'minimumDistance' }, 'spacing'],
  ]
  for (const [what, inputs, path] of bad) {
    it(`refuses ${what} at its field`, async () => {
      const { status, body } = await owner.post<Refused>(`/api/studies/${study}/candidates`, inputs)
      expect([status, body.errors?.map(error => error.path)]).toEqual([422, [path]])
    })
  }
  it('names the row and the field of many', async () => {
    const { status, body } = await owner.post<Refused>(`/api/studies/${study}/candidates`, { items: [{}, { order: 'x' }] })
    expect([status, body.errors]).toEqual([422, [{ path: 'items.1.order', message: 'Order M is a whole number from 2 to 4096.' }]])
  })
  it('tells a number beyond all limits once', async () => {
    const { body } = await owner.post<Refused>(`/api/studies/${study}/candidates`, { order: 1e308 })
    expect(body.errors).toEqual([{ path: 'order', message: 'Order M is a whole number from 2 to 4096.' }])
  })
  it('refuses NaN, which JSON writes as null', async () => {
    const { status } = await owner.post(`/api/studies/${study}/candidates`, { snrStart: NaN })
    expect(status).toBe(422)
  })
  it('refuses an infinity', async () => {
    const response = await owner.fetch(`/api/studies/${study}/candidates`, {
      method: 'POST', body: '{"snrStop":1e999}', headers: { 'content-type': 'application/json' },
    })
    expect(response.status).toBe(422)
  })
  it('refuses a body of 10 MB', async () => {
    const { status } = await owner.post(`/api/studies/${study}/candidates`, { note: 'x'.repeat(10 * 1024 * 1024) })
    expect(status).toBe(413)
  })
})

describe('changing a row', () => {
  it('raises its version', async () => {
    const row = await ownRow(owner, study)
    const { body, headers } = await change(owner, row, { note: 'mine' })
    expect([body.version, headers.get('etag')]).toEqual([row.version + 1, `"${row.version + 1}"`])
  })
  it('needs If-Match', async () => {
    const row = await ownRow(owner, study)
    expect((await owner.patch(`/api/candidates/${row.id}`, { note: 'x' })).status).toBe(428)
  })
  it('refuses a stale change and sends both values', async () => {
    const row = await ownRow(owner, study)
    await change(owner, row, { note: 'theirs' })
    const { status, body } = await change<Refused>(owner, row, { note: 'mine' })
    expect([status, body.current!.inputs.note, body.current!.version, body.sent]).toEqual([409, 'theirs', row.version + 1, { note: 'mine' }])
  })
  it('lets one of two changes at once win', async () => {
    const row = await ownRow(owner, study)
    const answers = await Promise.all([change(owner, row, { note: 'one' }), change(owner, row, { note: 'two' })])
    expect(answers.map(answer => answer.status).toSorted()).toEqual([200, 409])
  })
  it('refuses its own mistakes', async () => {
    const row = await ownRow(owner, study)
    const { status, body } = await change<Refused>(owner, row, { order: 24 })
    expect([status, body.errors![0]!.path]).toEqual([422, 'order'])
    expect((await owner.get<Candidate>(`/api/candidates/${row.id}`)).body.version).toBe(row.version)
  })
  it('saves what it means for other fields, and the row says what is allowed there', async () => {
    const row = await ownRow(owner, study)
    const { body } = await change(owner, row, { family: 'cross-qam' })
    expect([body.state, body.errors, body.inputs.order]).toEqual(
      ['failed', [{ path: 'order', message: 'Cross QAM has 32, 128 or 512 points.' }], 16])
  })
  it('renames a row that is called after its parameters', async () => {
    expect((await change(owner, await ownRow(owner, study), { order: 64 })).body.inputs.name).toBe('64-QAM')
  })
  it('keeps a name that was given', async () => {
    expect((await change(owner, await ownRow(owner, study, { name: 'Mine' }), { order: 64 })).body.inputs.name).toBe('Mine')
  })
  it('knows a result that was computed before', async () => {
    const row = await computed(await ownRow(owner, study, { order: 256 }))
    expect((await change(owner, row, { note: 'same numbers' })).body.state).toBe('computed')
  })
  it('leaves one reference a study', async () => {
    const own = await ownStudy(owner, 'Reference')
    await ownRow(owner, own, { name: 'old', role: 'reference' })
    await change(owner, await ownRow(owner, own, { name: 'new' }), { role: 'reference' })
    expect((await allRows(owner, own)).filter(row => row.inputs.role === 'reference').map(row => row.inputs.name)).toEqual(['new'])
  })
})

describe('selections', () => {
  it('deletes and restores rows at their places', async () => {
    const own = await ownStudy(owner, 'Back again')
    const rows = (await owner.post<Rows>(`/api/studies/${own}/candidates`, { items: [{ name: 'a' }, { name: 'b' }, { name: 'c' }] })).body.items
    await owner.post(`/api/studies/${own}/candidates/delete`, { ids: [rows[1]!.id] })
    expect((await allRows(owner, own)).map(row => row.inputs.name)).toEqual(['a', 'c'])
    await owner.post(`/api/studies/${own}/candidates/restore`, { ids: [rows[1]!.id] })
    expect((await allRows(owner, own)).map(row => row.inputs.name)).toEqual(['a', 'b', 'c'])
  })
  it('does not delete a row that has changed since', async () => {
    const row = await ownRow(owner, study)
    await change(owner, row, { note: 'still needed' })
    expect((await owner.delete(`/api/candidates/${row.id}`, undefined, { 'if-match': `"${row.version}"` })).status).toBe(409)
  })
  it('does not touch rows of another study', async () => {
    const row = await ownRow(owner, await ownStudy(owner, 'Other'))
    const { status, body } = await owner.post<Refused>(`/api/studies/${study}/candidates/delete`, { ids: [row.id] })
    expect([status, body.errors![0]!.path]).toEqual([422, 'ids.0'])
  })
  it('duplicates rows behind the last of them', async () => {
    const own = await ownStudy(owner, 'Twice')
    const rows = (await owner.post<Rows>(`/api/studies/${own}/candidates`, { items: [{ name: 'a', role: 'reference' }, { name: 'b' }] })).body.items
    await owner.post(`/api/studies/${own}/candidates/duplicate`, { ids: [rows[0]!.id] })
    expect((await allRows(owner, own)).map(row => [row.inputs.name, row.inputs.role])).toEqual([['a', 'reference'], ['a', null], ['b', null]])
  })
  it('moves rows, also into places that have been halved sixty times', async () => {
    const own = await ownStudy(owner, 'Order')
    const [a, b, c] = (await owner.post<Rows>(`/api/studies/${own}/candidates`, { items: [{ name: 'a' }, { name: 'b' }, { name: 'c' }] })).body.items
    for (let i = 0; i < 60; i++) await owner.post(`/api/studies/${own}/candidates/move`, { ids: [i % 2 ? b!.id : c!.id], after: a!.id })
    expect((await allRows(owner, own)).map(row => row.inputs.name)).toEqual(['a', 'b', 'c'])
  })
  it('pins twelve rows and says why it pins no thirteenth', async () => {
    const own = await ownStudy(owner, 'Pins')
    const items = Array.from({ length: 13 }, (_, i) => ({ name: `row ${i + 1}` }))
    const rows = (await owner.post<Rows>(`/api/studies/${own}/candidates`, { items })).body.items
    const pins = []
    for (const row of rows) pins.push(await owner.put<Candidate & Refused>(`/api/studies/${own}/pins`, { candidate: row.id, pinned: true }))
    expect(pins.map(pin => pin.body.pin ?? pin.status)).toEqual([1, 2, 3, 4, 5, 6, 7, 8, 9, 10, 11, 12, 422])
  })
  it('reuses a slot that has become free', async () => {
    const own = await ownStudy(owner, 'Free slot')
    const rows = (await owner.post<Rows>(`/api/studies/${own}/candidates`, { items: [{}, {}, {}] })).body.items
    const pin = (n: number, pinned: boolean) => owner.put<Candidate>(`/api/studies/${own}/pins`, { candidate: rows[n]!.id, pinned })
    await pin(0, true)
    await pin(1, true)
    await pin(0, false)
    expect((await pin(2, true)).body.pin).toBe(1)
  })
})

describe('what is drawn of a row', () => {
  it('has curves over its SNR range', async () => {
    const row = await computed(await ownRow(owner, study, { snrStart: 0, snrStop: 20, snrStep: 10 }))
    const { body } = await owner.get<CandidateCurves>(`/api/candidates/${row.id}/curves`)
    expect([body.esN0Db, body.serExact.length]).toEqual([[0, 10, 20], 3])
  })
  it('has the cells of QPSK as quarters of the box', async () => {
    const row = await ownRow(owner, study, { family: 'psk', order: 4 })
    const { body } = await owner.get<CandidateConstellation>(`/api/candidates/${row.id}/constellation`)
    const area = (cell: number[][]) => cell.reduce((sum, [x, y], i) => sum + x! * cell[(i + 1) % cell.length]![1]! - cell[(i + 1) % cell.length]![0]! * y!, 0) / 2
    expect(body.cells.map(cell => area(cell) / (4 * body.box ** 2)).map(part => Number(part.toFixed(12)))).toEqual([0.25, 0.25, 0.25, 0.25])
  })
  it('has neighbours with their distances at unit mean energy', async () => {
    const row = await ownRow(owner, study, { family: 'psk', order: 4 })
    const { body } = await owner.get<CandidateConstellation>(`/api/candidates/${row.id}/constellation`)
    expect(body.neighbours[0]!.map(({ point, distance, nearest }) => [point, Number(distance.toFixed(12)), nearest]))
      .toEqual([[1, Number(Math.SQRT2.toFixed(12)), true], [3, Number(Math.SQRT2.toFixed(12)), true]])
  })
  it('has no curves for an entered scheme', async () => {
    const entered = { family: 'entered', basis: 'entered', enteredEsN0Db: 9, enteredNetBits: 2, backOff: 'entered', backOffDb: 1 }
    const row = await computed(await ownRow(owner, study, entered))
    expect((await owner.get(`/api/candidates/${row.id}/curves`)).status).toBe(404)
  })
})

describe('pages of rows', () => {
  it('follow one another without gap or repetition', async () => {
    const own = await ownStudy(owner, 'Pages')
    await owner.post(`/api/studies/${own}/candidates`, { items: Array.from({ length: 25 }, (_, i) => ({ name: `row ${i + 1}` })) })
    const names: string[] = []
    for (let next: string | null = ''; next !== null;) {
      const { body }: { body: Rows } = await owner.get<Rows>(`/api/studies/${own}/candidates?limit=10${next ? `&cursor=${next}` : ''}`)
      names.push(...body.items.map(row => row.inputs.name))
      next = body.next
    }
    expect(names).toEqual(Array.from({ length: 25 }, (_, i) => `row ${i + 1}`))
  })
  it('refuse a cursor that is none', async () => expect((await owner.get(`/api/studies/${study}/candidates?cursor=x`)).status).toBe(422))
})
