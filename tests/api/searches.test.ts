import { beforeAll, describe, expect, it } from 'vitest'
import type { Candidate } from '#shared/schemas/candidates'
import type { Problem } from '#shared/schemas/common'
import type { Search } from '#shared/schemas/searches'
import { signIn } from '../support/client'
import type { Client } from '../support/client'
import { otherServer } from './other-server'
import { allRows, ownRow, ownStudy, Stream } from './own-study'

let owner: Client
beforeAll(async () => {
  owner = await signIn('owner')
})

const begin = <Body = Search>(client: Client, row: Candidate, asked: object) => client.post<Body>(`/api/candidates/${row.id}/searches`, asked)
const searchOf = async (client: Client, study: string) => (await client.get<{ items: Search[] }>(`/api/studies/${study}/searches`)).body.items[0]!

/** Waits by the study's events until its search is in one of the states. */
async function reached(client: Client, study: string, states: Search['state'][]): Promise<Search> {
  const stream = await Stream.open(client, study)
  const last = () => stream.received.findLast(({ data }) => data.job)?.data.job
  if (!states.includes((await searchOf(client, study)).state)) await stream.until(() => states.includes(last()?.state ?? 'queued'))
  await stream.close()
  return searchOf(client, study)
}

const natural = { family: 'psk', order: 8, labelling: 'natural' }
/** Points without any order, so that many exchanges are looked at. */
const scattered = { family: 'custom', points: Array.from({ length: 256 }, (_, i) => [Math.cos(i * i), Math.sin(i * 3) * i / 256]), backOff: 'papr' }

describe('a search for labels', () => {
  it('makes a row behind the one that was searched, with better labels, saying how', async () => {
    const study = await ownStudy(owner, 'Labels')
    const row = await ownRow(owner, study, natural)
    await begin(owner, row, { kind: 'labels', starts: 5 })
    const { resultId, progress } = await reached(owner, study, ['done'])
    const rows = await allRows(owner, study)
    expect([progress!.value < progress!.startValue, rows.map(({ id }) => id), rows[1]!.inputs.labelling, rows[1]!.inputs.note.startsWith('Found by a search for labels')])
      .toEqual([true, [row.id, resultId], 'own', true])
  })
  it('makes no row where nothing better is found', async () => {
    const study = await ownStudy(owner, 'Gray already')
    await begin(owner, await ownRow(owner, study, { family: 'psk', order: 4 }), { kind: 'labels', starts: 3 })
    expect((await reached(owner, study, ['done'])).resultId).toBeNull()
  })
  it('is refused where points cannot have labels', async () => {
    const { status, body } = await begin<Problem>(owner, await ownRow(owner, await ownStudy(owner, 'Twelve'), { family: 'psk', order: 12 }), { kind: 'labels' })
    expect([status, body.errors![0]!.path]).toEqual([422, 'labels'])
  })
  it('is refused on a fading channel', async () => {
    const { status, body } = await begin<Problem>(owner, await ownRow(owner, await ownStudy(owner, 'Faded'), { channel: 'rayleigh' }), { kind: 'labels' })
    expect([status, body.errors![0]!.path]).toEqual([422, 'channel'])
  })
  it('is cancelled, keeps what it has found, and goes on from there', async () => {
    const study = await ownStudy(owner, 'Cancelled search')
    const { body: { id } } = await begin(owner, await ownRow(owner, study, scattered), { kind: 'labels', starts: 1000 })
    await reached(owner, study, ['running'])
    const { body: cancelled } = await owner.delete<Search>(`/api/searches/${id}`)
    const { body: resumed } = await owner.post<Search>(`/api/searches/${id}/resume`, {})
    await owner.delete(`/api/searches/${id}`)
    expect([cancelled.state, resumed.state, resumed.progress!.evaluations >= cancelled.progress!.evaluations]).toEqual(['cancelled', 'queued', true])
  })
  it('goes on after the server that ran it was killed', async () => {
    const first = await otherServer()
    const study = await ownStudy(first.client, 'Killed in a search')
    // Some seconds of slices: long enough to be killed in.
    await begin(first.client, await ownRow(first.client, study, { ...scattered, points: scattered.points.slice(0, 128) }), { kind: 'labels', starts: 100 })
    const before = await reached(first.client, study, ['running'])
    await first.kill()
    const second = await otherServer()
    const after = await reached(second.client, study, ['done'])
    const rows = await allRows(second.client, study)
    await second.stop()
    expect([after.state, after.progress!.evaluations > before.progress!.evaluations, rows.length]).toEqual(['done', true, 2])
  })
})

describe('a search for parameters', () => {
  it('finds a ring ratio that needs less SNR', async () => {
    const study = await ownStudy(owner, 'Ratio')
    const row = await ownRow(owner, study, { family: 'apsk', rings: [4, 12], ratios: [3.5], backOff: 'papr' })
    await begin(owner, row, { kind: 'parameters', free: ['ratios'], starts: 2, budget: 60 })
    const { progress } = await reached(owner, study, ['done'])
    const [, found] = await allRows(owner, study)
    expect([progress!.value < progress!.startValue - 0.5, found!.inputs.family, found!.inputs.ratios![0]! < 3]).toEqual([true, 'apsk', true])
  })
  it('is refused for what the family does not have', async () => {
    const { status, body } = await begin<Problem>(owner, await ownRow(owner, await ownStudy(owner, 'No ratio')), { kind: 'parameters', free: ['ratios'] })
    expect([status, body.errors![0]!.path]).toEqual([422, 'free'])
  })
  it('is refused for bounds that leave the start out', async () => {
    const row = await ownRow(owner, await ownStudy(owner, 'Bounds'), { family: 'apsk', rings: [4, 12], ratios: [2.5] })
    const { status, body } = await begin<Problem>(owner, row, { kind: 'parameters', free: ['ratios'], bounds: { ratios: [3, 4] } })
    expect([status, body.errors![0]!.path]).toEqual([422, 'bounds.ratios'])
  })
})
