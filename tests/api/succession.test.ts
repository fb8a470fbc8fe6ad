import { beforeAll, describe, expect, it } from 'vitest'
import type { ActivityEntry } from '#shared/schemas/activity'
import type { Problem } from '#shared/schemas/common'
import type { Member } from '#shared/schemas/members'
import { accountOf, signIn } from '../support/client'
import type { Client } from '../support/client'
import { ownStudy } from './own-study'
import { ownPerson } from './people-of-test'
import type { OwnPerson } from './people-of-test'

let admin: Client
beforeAll(async () => {
  admin = await signIn('admin')
})

const disable = <Body = Problem>(person: OwnPerson, more: object = {}) => admin.patch<Body>(`/api/people/${person.id}`, { disabled: true, ...more })
const rolesIn = async (study: string) =>
  (await admin.get<{ items: Member[] }>(`/api/studies/${study}/members`)).body.items.map(({ name, role }) => `${name}: ${role}`)
const mayEnter = async (person: OwnPerson) => person.signIn().then(() => true, () => false)

describe('disabling a study\'s only owner', () => {
  it('is refused without a successor, naming the studies, and changes nothing', async () => {
    const leaving = await ownPerson('Only Owner')
    const client = await leaving.signIn()
    const study = await ownStudy(client, 'Ridge to valley')
    await ownStudy(client, 'Valley to lake')
    const { status, body } = await disable(leaving)
    const message = 'Only Owner is the only owner of “Ridge to valley” and “Valley to lake”. Name a successor, who then owns them.'
    expect([status, body.errors]).toEqual([422, [{ path: 'successor', message }]])
    expect([await mayEnter(leaving), await rolesIn(study)]).toEqual([true, ['Only Owner: owner']])
  })
  it('passes the studies to the successor, whatever their role was', async () => {
    const [leaving, next] = [await ownPerson('Leaving Owner'), await ownPerson('Next Owner')]
    const client = await leaving.signIn()
    const [known, unknown] = [await ownStudy(client, 'Known to both'), await ownStudy(client, 'Known to one')]
    await client.put(`/api/studies/${known}/members`, { email: next.email, role: 'observer' })
    const { status } = await disable(leaving, { successor: next.id })
    expect([status, await mayEnter(leaving)]).toEqual([200, false])
    expect([await rolesIn(known), await rolesIn(unknown)]).toEqual([
      ['Next Owner: owner', 'Leaving Owner: editor'], ['Next Owner: owner', 'Leaving Owner: editor'],
    ])
  })
  it('stands in the study\'s activity by both names', async () => {
    const [leaving, next] = [await ownPerson('Noted Owner'), await ownPerson('Noting Owner')]
    const study = await ownStudy(await leaving.signIn(), 'Written down')
    await disable(leaving, { successor: next.id })
    const { body } = await admin.get<{ items: ActivityEntry[] }>(`/api/studies/${study}/activity`)
    expect(body.items.map(({ action, from, to }) => ({ action, from, to }))[0]).toEqual(
      { action: 'passed ownership of', from: { owner: 'Noted Owner' }, to: { owner: 'Noting Owner' } },
    )
  })
  it('passes on a deleted study too, which the successor can restore', async () => {
    const [leaving, next] = [await ownPerson('Deleting Owner'), await ownPerson('Restoring Owner')]
    const client = await leaving.signIn()
    const study = await ownStudy(client, 'Deleted and passed on')
    await client.delete(`/api/studies/${study}`, undefined, { 'if-match': '"1"' })
    await disable(leaving, { successor: next.id })
    expect((await (await next.signIn()).post(`/api/studies/${study}/restore`)).status).toBe(200)
  })
  it.each([
    ['nobody', () => '00000000-0000-7000-8000-000000000000'],
    ['the person', (leaving: OwnPerson) => leaving.id],
    ['a disabled account', (_: OwnPerson, disabled: OwnPerson) => disabled.id],
  ])('takes no successor who is %s', async (what, of) => {
    const [leaving, disabled] = [await ownPerson(`Staying Owner of ${what}`), await ownPerson(`Gone before ${what}`)]
    await ownStudy(await leaving.signIn(), 'Not passed on')
    await disable(disabled)
    const { status, body } = await disable(leaving, { successor: of(leaving, disabled) })
    expect([status, body.errors]).toEqual([422, [{ path: 'successor', message: 'A successor is another account that may sign in.' }]])
  })
})

describe('a successor', () => {
  it('is not needed where another owner may sign in, and the studies stay as they are', async () => {
    const leaving = await ownPerson('One Of Two')
    const client = await leaving.signIn()
    const study = await ownStudy(client, 'Owned by two')
    await client.put(`/api/studies/${study}/members`, { email: accountOf('owner').email, role: 'owner' })
    expect([(await disable(leaving)).status, (await rolesIn(study)).filter(text => text.endsWith(': owner')).length]).toEqual([200, 2])
  })
  it('is needed where the other owner is disabled', async () => {
    const [leaving, gone] = [await ownPerson('Last Of Two'), await ownPerson('First Of Two')]
    const client = await leaving.signIn()
    await client.put(`/api/studies/${await ownStudy(client, 'Owned by one left')}/members`, { email: gone.email, role: 'owner' })
    await disable(gone)
    expect((await disable(leaving)).status).toBe(422)
  })
  it('of two owners who are disabled at once is needed by one of them', async () => {
    const [one, two] = [await ownPerson('Owner At Once'), await ownPerson('Owner As Well')]
    const client = await one.signIn()
    await client.put(`/api/studies/${await ownStudy(client, 'Left by both')}/members`, { email: two.email, role: 'owner' })
    const answers = await Promise.all([disable(one), disable(two)])
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 422])
  })
  it('is named with disabling only', async () => {
    const person = await ownPerson('Renamed Person')
    const { status, body } = await admin.patch<Problem>(`/api/people/${person.id}`, { name: 'Renamed', successor: person.id })
    expect([status, body.errors?.[0]?.path]).toEqual([422, 'successor'])
  })
})
