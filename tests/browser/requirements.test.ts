import type { Browser, Page } from 'playwright-core'
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import type { Requirements } from '#shared/schemas/requirements'
import type { Study, StudySummary } from '#shared/schemas/studies'
import { launchBrowser, openPage } from '../support/browser'
import { signIn } from '../support/client'
import type { Client } from '../support/client'
import { openReady, unexpected } from './study-of-page'

let browser: Browser
let page: Page
let complaints: string[]
let owner: Client
let ridge: string
let id: string

beforeAll(async () => {
  browser = await launchBrowser()
  owner = await signIn('owner')
  const { body } = await owner.get<{ items: StudySummary[] }>('/api/studies')
  ridge = body.items.find(({ name }) => name === 'Ridge station to valley gateway')!.id
  const opened = await openPage(browser, 'owner')
  page = opened.page
  complaints = opened.complaints
  page.on('dialog', dialog => void dialog.accept())
})
afterAll(() => browser.close())

/** Each test works on a copy of the demonstration's requirements. */
beforeEach(async () => {
  const { body: { requirements } } = await owner.get<Study>(`/api/studies/${ridge}`)
  const { body: study } = await owner.post<Study>('/api/studies', { name: 'Requirements under test' })
  await owner.patch(`/api/studies/${study.id}`, { requirements }, { 'if-match': `"${study.version}"` })
  id = study.id
  complaints.length = 0
  await openReady(page, `/studies/${id}/requirements`)
})

const saved = async (): Promise<Requirements> => (await owner.get<Study>(`/api/studies/${id}`)).body.requirements
const allSaved = () => page.getByText('All changes are saved.').waitFor()
const caseOf = (name: string) => page.getByRole('region', { name: `Case ${name}` })
/** The last cell of a case's line: what that line comes to. */
const sum = (name: string, what: string) => caseOf(name).getByRole('row').filter({ hasText: what }).last().getByRole('cell').nth(1)

describe('the target', () => {
  it('may be a bit error rate before decoding', async () => {
    await page.getByLabel('Target stated as').selectOption({ label: 'BER, bit error rate' })
    await page.getByLabel('Target bit error rate (BER)').fill('1e-5')
    await page.getByLabel('Target holds').selectOption({ label: 'Before decoding' })
    await allSaved()
    await expect.poll(async () => (await saved()).target).toEqual({ quantity: 'ber', value: 1e-5, stage: 'beforeDecoding' })
  })
})

describe('the link budget', () => {
  it('states what the clear and the faded case deliver', async () => {
    expect(await sum('Clear', 'Available Es/N0 at saturation, dB').textContent()).toBe('45.95')
    expect(await sum('Faded', 'Available Es/N0 at saturation, dB').textContent()).toBe('28.75')
    expect(await sum('Faded', 'Received level, dBm').textContent()).toBe('−72.74')
  })

  it('an edited line has levels and available Es/N0 follow at once, and is there after a reload', async () => {
    await page.getByLabel('Value of Saturated output').fill('30')
    await sum('Faded', 'Available Es/N0 at saturation').filter({ hasText: '31.75' }).waitFor()
    await sum('Faded', 'Received level').filter({ hasText: '−69.74' }).waitFor()
    await allSaved()
    const { available } = await saved()
    expect(available.from === 'link' && available.lines[0]).toMatchObject({ name: 'Saturated output', valueDb: 30 })
    await openReady(page, `/studies/${id}/requirements`)
    expect(await page.getByLabel('Value of Saturated output').inputValue()).toBe('30')
    await sum('Faded', 'Available Es/N0 at saturation').filter({ hasText: '31.75' }).waitFor()
    expect(complaints).toEqual([])
  })

  it('free-space loss follows frequency and distance', async () => {
    await page.getByLabel('Distance of Free space, km').fill('76')
    // twice the distance: 6.02 dB less
    await sum('Faded', 'Available Es/N0 at saturation').filter({ hasText: '22.73' }).waitFor()
    await allSaved()
    expect(complaints).toEqual([])
  })

  it('a second power in dBW says that one case has one unit, and is not saved', async () => {
    await page.getByRole('button', { name: 'Add a line' }).first().click()
    await page.getByRole('menuitem', { name: 'Power', exact: true }).click()
    await page.getByText(/is a second power: a link case has one/).first().waitFor()
    await page.getByLabel('Unit of Power').selectOption({ label: 'dBW' })
    await page.getByText('“Saturated output” is in dBm and “Power” in dBW: use one unit in a link case.').first().waitFor()
    await page.getByText(/not saved: see the marked fields/).waitFor()
    expect(JSON.stringify(await saved())).not.toContain('dBW')
    await page.getByRole('button', { name: 'Commands for Power' }).click()
    await page.getByRole('menuitem', { name: 'Remove' }).click()
    await allSaved()
    expect(unexpected(complaints, 422)).toEqual([])
  })

  it('a case is added and removed', async () => {
    await page.getByRole('button', { name: 'Add a case' }).click()
    await caseOf('case 3').waitFor()
    await allSaved()
    await caseOf('case 3').getByRole('button', { name: 'Remove this case' }).click()
    await caseOf('case 3').waitFor({ state: 'detached' })
    await allSaved()
    expect((await saved()).available).toMatchObject({ cases: [{ name: 'Clear' }, { name: 'Faded' }] })
    expect(complaints).toEqual([])
  })

  it('another source of Es/N0 can be looked at without losing the budget', async () => {
    const source = page.getByLabel('Available Es/N0 comes from')
    await source.selectOption({ label: 'Entered as a number' })
    await page.getByRole('textbox', { name: 'Available Es/N0', exact: true }).fill('25')
    await allSaved()
    expect((await saved()).available).toEqual({ from: 'entered', esN0Db: 25 })
    await source.selectOption({ label: 'Link budget' })
    await sum('Faded', 'Available Es/N0 at saturation').filter({ hasText: '28.75' }).waitFor()
    await allSaved()
    expect(complaints).toEqual([])
  })
})

describe('values', () => {
  it('what is no number keeps its text, says so and is not saved; the others are', async () => {
    await page.getByLabel('Roll-off').fill('a quarter')
    await page.getByText(/It is not saved yet/).waitFor()
    await page.getByLabel('Overhead').fill('7')
    await expect.poll(async () => (await saved()).overhead).toBe(0.07)
    expect(await page.getByLabel('Roll-off').inputValue()).toBe('a quarter')
    expect((await saved()).rollOff).toBe(0.25)
    await page.getByLabel('Roll-off').fill('0.3')
    await allSaved()
    expect((await saved()).rollOff).toBe(0.3)
    expect(complaints).toEqual([])
  })

  it('a value out of its limits says what is allowed', async () => {
    await page.getByLabel('Roll-off').fill('2')
    await page.getByText('Enter a roll-off from 0 to 1.').waitFor()
    expect((await saved()).rollOff).toBe(0.25)
    await page.getByLabel('Roll-off').fill('0.25')
    await allSaved()
    expect(complaints).toEqual([])
  })

  it('a text that is too long is kept as typed, says what is allowed and is not saved', async () => {
    await page.getByLabel('ID', { exact: true }).first().fill('R'.repeat(25))
    await page.getByText('An ID has at most 24 characters.').waitFor()
    expect(await page.getByLabel('ID', { exact: true }).first().inputValue()).toBe('R'.repeat(25))
    expect((await saved()).mustHaves[0]?.id).toBe('R1')
    await page.getByLabel('ID', { exact: true }).first().fill('R1')
    await allSaved()
    expect(complaints).toEqual([])
  })

  it('a must-have is added with an ID of its own, valued and removed', async () => {
    await page.getByRole('button', { name: 'Add a must-have' }).click()
    await page.getByLabel('Kind of R4').selectOption({ label: 'Maximum PAPR' })
    await page.getByLabel('Value of R4').fill('6')
    await allSaved()
    expect((await saved()).mustHaves.at(-1)).toEqual({ id: 'R4', kind: 'papr', value: 6, reason: '' })
    await page.getByRole('button', { name: 'Remove R4' }).click()
    await allSaved()
    expect((await saved()).mustHaves.map(({ id }) => id)).toEqual(['R1', 'R2', 'R3'])
    expect(complaints).toEqual([])
  })

  it('what somebody else changes appears by itself', async () => {
    await page.getByText('All changes are saved.').waitFor()
    const { body: study } = await owner.get<Study>(`/api/studies/${id}`)
    await owner.patch(`/api/studies/${id}`, { requirements: { ...study.requirements, overhead: 0.1 } }, { 'if-match': `"${study.version}"` })
    await expect.poll(() => page.getByLabel('Overhead').inputValue()).toBe('10')
    expect(complaints).toEqual([])
  })

  it('a value of a must-have stays with it when one above it is removed before it is saved', async () => {
    await page.getByLabel('Value of R3').fill('6.5')
    await page.getByRole('button', { name: 'Remove R1' }).click()
    await allSaved()
    expect((await saved()).mustHaves.map(({ id, value }) => [id, value])).toEqual([['R2', 20], ['R3', 6.5]])
    expect(complaints).toEqual([])
  })

  it('what is typed into a must-have that cannot be saved yet is not lost', async () => {
    await page.getByLabel('ID', { exact: true }).nth(1).fill('R1')
    await page.getByText('Every must-have has an ID of its own.').waitFor()
    await page.getByRole('button', { name: 'Add a must-have' }).click()
    await page.getByLabel('Value of R4').fill('6')
    await page.getByText(/not saved: see the marked fields/).waitFor()
    await page.getByLabel('ID', { exact: true }).nth(1).fill('R2')
    await allSaved()
    expect((await saved()).mustHaves.map(({ id, value }) => [id, value])).toEqual([['R1', 1], ['R2', 20], ['R3', 7], ['R4', 6]])
    expect(complaints).toEqual([])
  })

  it('a value that somebody else has changed meanwhile is not overwritten unseen', async () => {
    // As long as something typed is not saved, the page does not take over what others change.
    await page.getByLabel('Roll-off').fill('a quarter')
    await page.getByText(/It is not saved yet/).waitFor()
    const { body: study } = await owner.get<Study>(`/api/studies/${id}`)
    await owner.patch(`/api/studies/${id}`, { requirements: { ...study.requirements, overhead: 0.1 } }, { 'if-match': `"${study.version}"` })
    await page.getByLabel('Overhead').fill('20')
    const dialog = page.getByRole('dialog')
    await dialog.getByText('Saved: 10 %').waitFor()
    await dialog.getByText('Yours: 20 %').click()
    await dialog.getByRole('button', { name: 'Keep what is chosen' }).click()
    await dialog.waitFor({ state: 'hidden' })
    expect(await page.getByLabel('Roll-off').inputValue()).toBe('a quarter')
    await page.getByLabel('Roll-off').fill('0.25')
    await allSaved()
    expect((await saved()).overhead).toBe(0.2)
    expect(unexpected(complaints, 409)).toEqual([])
  })
})

describe('an observer', () => {
  it('reads the requirements and cannot change them', async () => {
    const observer = await openPage(browser, 'observer')
    await openReady(observer.page, `/studies/${ridge}/requirements`)
    await observer.page.getByText('Your role may read these requirements, not change them.').waitFor()
    expect(await observer.page.getByLabel('Roll-off').isEditable()).toBe(false)
    expect(await observer.page.getByRole('button', { name: 'Add a case' }).count()).toBe(0)
    expect(observer.complaints).toEqual([])
    await observer.page.context().close()
  })
})
