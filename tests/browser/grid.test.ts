import type { Browser, Page } from 'playwright-core'
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import type { Candidate } from '#shared/schemas/candidates'
import { ownRow, ownStudy } from '../api/own-study'
import { launchBrowser, openPage } from '../support/browser'
import { signIn } from '../support/client'
import type { Client } from '../support/client'
import { cell, columnTexts, untilColumn, wide } from './grid-of-page'

let browser: Browser
let owner: Client
let study: string
let rows: Candidate[]
let page: Page
let complaints: string[]
beforeAll(async () => {
  browser = await launchBrowser()
  owner = await signIn('owner')
})
afterAll(() => browser.close())

/** A page on a fresh study with three rows, in each test's own context. */
beforeEach(async () => {
  study = await ownStudy(owner, 'Grid')
  rows = []
  for (const order of [16, 64, 4]) rows.push(await ownRow(owner, study, { family: 'qam', order }))
  const opened = await openPage(browser, 'owner', { viewport: wide })
  page = opened.page
  complaints = opened.complaints
  await page.goto(`/studies/${study}/candidates`)
  await untilColumn(page, 'requiredEsN0', texts => texts.length === 3 && texts.every(text => /^\d/.test(text)))
  return () => page.context().close()
})

/** Types into a cell and commits. */
async function enter(name: string, column: string, text: string) {
  const target = await cell(page, name, column)
  await target.click()
  await page.keyboard.press('Enter')
  const editor = page.locator('.ag-cell-inline-editing input, .ag-cell-inline-editing select, .ag-popup-editor input')
  await editor.fill(text)
  await page.keyboard.press('Enter')
}

describe('an edit', () => {
  it('brings new numbers into its row', async () => {
    await enter('16-QAM', 'order', '256')
    // Exact square QAM at SER 1e-6: 33.30 dB for M = 256, from its closed form in SciPy.
    await untilColumn(page, 'requiredEsN0', ([first]) => first === '33.30')
    expect(await columnTexts(page, 'name')).toEqual(['256-QAM', '64-QAM', '4-QAM'])
    expect(complaints).toEqual([])
  })
  it('of an order that the family cannot have keeps the typed text and says what is allowed', async () => {
    await enter('16-QAM', 'order', '12')
    // Enter has moved on: the sentence is with the cell.
    await (await cell(page, '16-QAM', 'order')).click()
    await page.getByText('QAM has a power of two of points from 4 to 4096.').first().waitFor()
    expect(await untilColumn(page, 'order', ([first]) => first === '12')).toEqual(['12', '64', '4'])
    expect((await owner.get<Candidate>(`/api/candidates/${rows[0]!.id}`)).body.inputs.order).toBe(16)
    await enter('64-QAM', 'order', '1024')
    await untilColumn(page, 'name', names => names.includes('1024-QAM'))
    expect(complaints).toEqual([])
  })
  it('is left with Escape', async () => {
    await (await cell(page, '16-QAM', 'note')).click()
    await page.keyboard.press('Enter')
    await page.keyboard.type('not kept')
    await page.keyboard.press('Escape')
    expect(await (await cell(page, '16-QAM', 'note')).textContent()).toBe('')
  })
  it('that somebody else has outrun offers both values', async () => {
    // The page's own event stream would bring the other change before the edit: here it is cut off.
    await page.route('**/events*', route => route.abort())
    await page.reload()
    await untilColumn(page, 'requiredEsN0', texts => texts.length === 3 && texts.every(text => /^\d/.test(text)))
    await owner.patch(`/api/candidates/${rows[0]!.id}`, { note: 'theirs' }, { 'if-match': `"${rows[0]!.version}"` })
    await enter('16-QAM', 'note', 'mine')
    await (await cell(page, '16-QAM', 'note')).click()
    await page.getByRole('button', { name: 'Keep mine: mine' }).waitFor()
    await page.getByRole('button', { name: 'Take theirs: theirs' }).waitFor()
    expect((await owner.get<Candidate>(`/api/candidates/${rows[0]!.id}`)).body.inputs.note).toBe('theirs')
    await page.getByRole('button', { name: 'Keep mine: mine' }).click()
    await expect.poll(async () => (await owner.get<Candidate>(`/api/candidates/${rows[0]!.id}`)).body.inputs.note).toBe('mine')
  })
  it('whose save is lost never looks saved, and can be tried again', async () => {
    await page.route('**/api/candidates/*', route => route.request().method() === 'PATCH' ? route.abort() : route.continue())
    await enter('16-QAM', 'note', 'kept')
    await (await cell(page, '16-QAM', 'note')).click()
    await page.getByRole('button', { name: 'Try again' }).waitFor()
    expect(await (await cell(page, '16-QAM', 'note')).getAttribute('class')).toContain('cell-refused')
    await page.unroute('**/api/candidates/*')
    await page.getByRole('button', { name: 'Try again' }).click()
    await expect.poll(async () => (await owner.get<Candidate>(`/api/candidates/${rows[0]!.id}`)).body.inputs.note).toBe('kept')
    await expect.poll(async () => (await cell(page, '16-QAM', 'note')).getAttribute('class')).not.toContain('cell-refused')
  })
})

describe('rows', () => {
  it('are deleted by a command and come back with Undo', async () => {
    await (await cell(page, '64-QAM', 'name')).click()
    await page.getByRole('button', { name: '1 row', exact: true }).click()
    await page.getByRole('menuitem', { name: 'Delete 1 row' }).click()
    await untilColumn(page, 'name', names => names.length === 2)
    await page.getByRole('button', { name: 'Undo' }).click()
    expect(await untilColumn(page, 'name', names => names.length === 3)).toEqual(['16-QAM', '64-QAM', '4-QAM'])
    expect(complaints).toEqual([])
  })
  it('are duplicated and moved', async () => {
    await (await cell(page, '4-QAM', 'name')).click()
    await page.getByRole('button', { name: '1 row', exact: true }).click()
    await page.getByRole('menuitem', { name: 'Move up' }).click()
    expect(await untilColumn(page, 'name', names => names[1] === '4-QAM')).toEqual(['16-QAM', '4-QAM', '64-QAM'])
    await page.getByRole('button', { name: '1 row', exact: true }).click()
    await page.getByRole('menuitem', { name: 'Duplicate 1 row' }).click()
    await untilColumn(page, 'name', names => names.length === 4)
  })
  it('that cannot be computed say why, and sort last both ways', async () => {
    await owner.patch(`/api/candidates/${rows[1]!.id}`, { family: 'cross-qam' }, { 'if-match': `"${rows[1]!.version}"` })
    await untilColumn(page, 'verdict', texts => texts.some(text => text.includes('32, 128 or 512')))
    const header = page.locator('.ag-header-cell[col-id="requiredEsN0"]')
    for (const _ of ['up', 'down']) {
      await header.click()
      await untilColumn(page, 'requiredEsN0', texts => texts[2] === 'failed')
    }
  })
})

it('tells why a number is what it is, with the row\'s own values', async () => {
  await (await cell(page, '16-QAM', 'requiredEbN0')).click()
  await page.getByRole('button', { name: 'Why this number' }).click()
  await page.getByText('20.92 dB − 10·log10 4.000 = 14.90 dB').waitFor()
  await (await cell(page, '16-QAM', 'requiredEsN0')).click()
  await page.keyboard.press('Escape')
  await page.getByRole('heading', { name: 'Why this number' }).waitFor({ state: 'detached' })
})

it('shows a reviewer the rows without a way to change them', async () => {
  await owner.put(`/api/studies/${study}/members`, { email: 'henrik.sundqvist@example.org', role: 'reviewer' })
  const reviewer = await openPage(browser, 'reviewer', { viewport: wide })
  await reviewer.page.goto(`/studies/${study}/candidates`)
  await untilColumn(reviewer.page, 'requiredEsN0', texts => texts.length === 3)
  expect(await reviewer.page.getByRole('button', { name: 'Add a row' }).count()).toBe(0)
  await (await cell(reviewer.page, '16-QAM', 'note')).click()
  await reviewer.page.keyboard.press('Enter')
  expect(await reviewer.page.locator('.ag-cell-inline-editing').count()).toBe(0)
  expect(reviewer.complaints).toEqual([])
  await reviewer.page.context().close()
})
