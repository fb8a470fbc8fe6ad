import { beforeAll, describe, expect, it } from 'vitest'
import type { Candidate } from '#shared/schemas/candidates'
import type { Problem } from '#shared/schemas/common'
import type { PartsAnswer } from '#shared/schemas/parts'
import type { BitErrorCurves, CandidateConstellation, InformationCurves } from '#shared/schemas/values'
import { signIn } from '../support/client'
import type { Client } from '../support/client'
import { otherServer } from './other-server'
import { allRows, ownRow, ownStudy, Stream } from './own-study'

let owner: Client
let observer: Client
beforeAll(async () => {
  owner = await signIn('owner')
  observer = await signIn('observer')
})

const ask = <Body = PartsAnswer>(client: Client, study: string, part: string, ids: string[]) => client.post<Body>(`/api/studies/${study}/parts`, { part, ids })

/** A study with a row, and the row's part as it is once it has been computed. */
async function withPart(part: 'bits' | 'rates' | 'tolerances' | 'frames' | 'map', inputs: object): Promise<Candidate> {
  const study = await ownStudy(owner, `Part ${part}`)
  const row = await ownRow(owner, study, inputs)
  const stream = await Stream.open(owner, study)
  await ask(owner, study, part, [row.id])
  await stream.until(() => ['computed', 'failed'].includes(stream.rows.get(row.id)?.parts[part]?.state ?? ''))
  await stream.close()
  return (await owner.get<Candidate>(`/api/candidates/${row.id}`)).body
}

describe('parts of rows', () => {
  it('are absent until somebody asks', async () => {
    const row = await ownRow(owner, await ownStudy(owner, 'Unasked'))
    expect(row.parts).toEqual({})
  })
  it('come as events, and stay with the row', async () => {
    const row = await withPart('tolerances', { family: 'psk', order: 8 })
    expect(row.parts.tolerances!.values!.largestRotationDeg).toBeCloseTo(22.5, 9)
  })
  it('fail at the field that is lacking', async () => {
    const row = await withPart('bits', { family: 'psk', order: 12 })
    expect([row.parts.bits!.state, row.parts.bits!.errors[0]!.path]).toEqual(['failed', 'labelling'])
  })
  it('are not asked for again', async () => {
    const row = await withPart('rates', { family: 'psk', order: 4 })
    expect((await ask(owner, row.studyId, 'rates', [row.id])).body).toEqual({ computed: 1, queued: 0, without: 0 })
  })
  it('are not for entered schemes', async () => {
    const study = await ownStudy(owner, 'Entered')
    const row = await ownRow(owner, study, { family: 'entered', basis: 'entered', enteredEsN0Db: 9, enteredNetBits: 1, backOff: 'entered', backOffDb: 0 })
    expect((await ask(owner, study, 'bits', [row.id])).body).toEqual({ computed: 0, queued: 0, without: 1 })
  })
  it('may be asked for by whoever reads', async () => {
    const { body: { items } } = await observer.get<{ items: { id: string }[] }>('/api/studies')
    const [row] = await allRows(observer, items[0]!.id)
    expect((await ask(observer, items[0]!.id, 'tolerances', [row!.id])).status).toBe(202)
  })
  it('are refused for rows of another study', async () => {
    const row = await ownRow(owner, await ownStudy(owner, 'One'))
    const { status, body } = await ask<Problem>(owner, await ownStudy(owner, 'Two'), 'bits', [row.id])
    expect([status, body.errors![0]!.path]).toEqual([422, 'ids.0'])
  })
  it('are refused for a part that does not exist', async () => {
    const { status, body } = await ask<Problem>(owner, await ownStudy(owner, 'No part'), 'colour', ['00000000-0000-7000-8000-000000000000'])
    expect([status, body.errors![0]!.path]).toEqual([422, 'part'])
  })
  it('survive a server that is killed while they wait', async () => {
    const first = await otherServer()
    const study = await ownStudy(first.client, 'Killed among parts')
    const points = (seed: number) => Array.from({ length: 200 }, (_, i) => [Math.cos(seed + i * i), Math.sin(seed * i) + i / 200])
    const items = Array.from({ length: 12 }, (_, n) => ({ family: 'custom', points: points(n + 0.5), backOff: 'papr', note: 'killed' }))
    const { body } = await first.client.post<{ items: Candidate[] }>(`/api/studies/${study}/candidates`, { items })
    const ids = body.items.map(row => row.id)
    await ask(first.client, study, 'rates', ids)
    await first.kill()
    const second = await otherServer()
    const stream = await Stream.open(second.client, study)
    const done = async () => (await allRows(second.client, study)).every(row => row.parts.rates?.state === 'computed')
    if (!await done()) await stream.until(() => ids.every(id => stream.rows.get(id)?.parts.rates?.state === 'computed'))
    await stream.close()
    const computed = await done()
    await second.stop()
    expect(computed).toBe(true)
  })
})

describe('curves of a row', () => {
  const row = (inputs: object) => ownStudy(owner, 'Curves').then(study => ownRow(owner, study, { snrStart: 0, snrStop: 10, snrStep: 5, ...inputs }))
  it('are bit error rates where these are asked for', async () => {
    const { body } = await owner.get<BitErrorCurves>(`/api/candidates/${(await row({ family: 'psk', order: 4 })).id}/curves?quantity=ber`)
    expect([body.esN0Db, body.berExact[0]]).toEqual([[0, 5, 10], expect.closeTo(0.158655253931457, 9)])
  })
  it('are information rates where these are asked for', async () => {
    const { body } = await owner.get<InformationCurves>(`/api/candidates/${(await row({ family: 'psk', order: 4 })).id}/curves?quantity=rate`)
    expect([body.mutualInformation.length, body.bitMetricRate[2]! <= body.mutualInformation[2]! + 1e-6]).toEqual([3, true])
  })
  it('are refused where labels are lacking, naming the field', async () => {
    const { status, body } = await owner.get<Problem>(`/api/candidates/${(await row({ family: 'psk', order: 12 })).id}/curves?quantity=ber`)
    expect([status, body.errors![0]!.path]).toEqual([422, 'labels'])
  })
  it('are refused for a quantity that does not exist', async () =>
    expect((await owner.get(`/api/candidates/${(await row({})).id}/curves?quantity=colour`)).status).toBe(422))
})

describe('the close-up of a row', () => {
  it('has labels, errors by point, and shares of the bound that add up', async () => {
    const row = await ownRow(owner, await ownStudy(owner, 'Close-up'), { family: 'psk', order: 8 })
    const { body } = await owner.get<CandidateConstellation>(`/api/candidates/${row.id}/constellation`)
    expect([body.labels!.length, body.errorByPoint!.length, body.neighbours[0]!.reduce((sum, { share }) => sum + share!, 0)]).toEqual([8, 8, expect.closeTo(1, 12)])
  })
})
