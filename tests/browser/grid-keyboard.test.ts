import type { Browser, Page } from 'playwright-core'
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import type { CandidateChange } from '#shared/schemas/candidates'
import { launchBrowser, openPage } from '../support/browser'
import { signIn } from '../support/client'
import type { Client } from '../support/client'
import { columnTexts, untilColumn, wide } from './grid-of-page'
import { cellAt, namesOf, openCandidates, rowNow, studyWith } from './study-of-page'
import type { OwnStudy } from './study-of-page'

let browser: Browser
let page: Page
let complaints: string[]
let owner: Client
let study: OwnStudy

beforeAll(async () => {
  browser = await launchBrowser()
  owner = await signIn('owner')
  const opened = await openPage(browser, 'owner', { viewport: wide })
  page = opened.page
  complaints = opened.complaints
})
afterAll(() => browser.close())
beforeEach(() => {
  complaints.length = 0
})

/** Opens a fresh study with these rows. */
const open = async (...rows: CandidateChange[]) => {
  study = await studyWith(owner, 'Keys under test', rows)
  await openCandidates(page, study)
  return study.rows.map(({ id }) => id)
}
const cell = (row: string, column: string) => cellAt(page, row, column)
const psk8 = { name: '8-PSK', family: 'psk', order: 8 } as const
const qam16 = { name: 'a 16-QAM', family: 'qam', order: 16 } as const

describe('keys', () => {
  const focused = () => page.evaluate(() => {
    const cell = document.activeElement?.closest('.ag-cell')
    return `${cell?.closest('.ag-row')?.getAttribute('row-index')} ${cell?.getAttribute('col-id')}`
  })

  it('arrows move, Enter edits, Enter again saves and moves down, Escape gives up', async () => {
    const [first, second] = await open(psk8, qam16)
    await cell(first!, 'family').click()
    await page.keyboard.press('ArrowRight')
    expect(await focused()).toBe('0 order')
    await page.keyboard.press('ArrowDown')
    expect(await focused()).toBe('1 order')
    await page.keyboard.press('ArrowUp')
    await page.keyboard.press('Enter')
    await cell(first!, 'order').locator('input').fill('4')
    await page.keyboard.press('Enter')
    await expect.poll(focused).toBe('1 order')
    await expect.poll(async () => (await rowNow(owner, first!)).inputs.order).toBe(4)
    await page.keyboard.press('Enter')
    await cell(second!, 'order').locator('input').fill('64')
    await page.keyboard.press('Escape')
    await cell(second!, 'order').filter({ hasText: /^16$/ }).waitFor()
    expect((await rowNow(owner, second!)).inputs.order).toBe(16)
    expect(complaints).toEqual([])
  })

  it('typing replaces the text, Tab saves it and goes on to the next cell', async () => {
    const [row] = await open(qam16)
    await cell(row!, 'order').click()
    await page.keyboard.type('64')
    await page.keyboard.press('Tab')
    await expect.poll(async () => (await rowNow(owner, row!)).inputs.order).toBe(64)
    expect(await focused()).not.toBe('0 order')
    expect(complaints).toEqual([])
  })

  it('Delete clears an input cell, never the row, and leaves a computed cell alone', async () => {
    const [row] = await open({ ...qam16, note: 'to be cleared' })
    await cell(row!, 'note').click()
    await page.keyboard.press('Delete')
    await expect.poll(async () => (await rowNow(owner, row!)).inputs.note).toBe('')
    await cell(row!, 'requiredEsN0').click()
    await page.keyboard.press('Delete')
    expect(await columnTexts(page, 'requiredEsN0')).toEqual(['20.92'])
    expect(await namesOf(owner, study.id)).toEqual(['a 16-QAM'])
    expect(complaints).toEqual([])
  })

  it('Space selects rows, Alt+P pins them when the one with the focus is among them', async () => {
    const [first, second] = await open(psk8, qam16)
    await cell(first!, 'name').click()
    await page.keyboard.press('Space')
    await page.locator(`.ag-row-selected[row-id="${first}"]`).first().waitFor()
    await page.keyboard.press('ArrowDown')
    await page.locator(`.ag-row[row-id="${second}"] .ag-cell-focus[col-id="name"]`).waitFor()
    await page.keyboard.press('Space')
    await page.getByRole('button', { name: '2 rows' }).waitFor({ timeout: 8000 })
    await page.keyboard.press('Alt+KeyP')
    await cell(second!, 'name').getByRole('img', { name: /^pinned, line 2, / }).waitFor()
    expect((await rowNow(owner, first!)).pin).toBe(1)
    expect((await rowNow(owner, second!)).pin).toBe(2)
    expect(complaints).toEqual([])
  })
})

describe('columns, filters and order', () => {
  it('the column chooser shows and hides columns, and the choice outlasts the page', async () => {
    await open(qam16)
    const head = (column: string) => page.locator(`.ag-header-cell[col-id="${column}"]`)
    await page.getByRole('button', { name: 'Columns' }).click()
    const dialog = page.getByRole('dialog')
    await dialog.getByLabel('Find a column').fill('gap to capacity')
    await dialog.getByLabel('Gap to capacity, dB').check()
    await dialog.getByLabel('Find a column').fill('')
    await dialog.getByLabel('PAPR, dB', { exact: true }).uncheck()
    await dialog.getByRole('button', { name: 'Done' }).click()
    await head('gapToCapacity').waitFor()
    await head('papr').waitFor({ state: 'detached' })
    await page.reload()
    await head('gapToCapacity').waitFor()
    expect(await head('papr').count()).toBe(0)
    await page.getByRole('button', { name: 'Columns' }).click()
    await dialog.getByRole('button', { name: 'As on first opening' }).click()
    await dialog.getByRole('button', { name: 'Done' }).click()
    await head('papr').waitFor()
    expect(complaints).toEqual([])
  })

  it('heads of numbers have their units', async () => {
    await open(qam16)
    const units = await page.locator('.ag-header-cell').evaluateAll(cells => Object.fromEntries(cells.map(cell =>
      [cell.getAttribute('col-id'), cell.querySelector('.grid-head-unit')?.textContent ?? ''])))
    expect(units).toMatchObject({ surplus: 'dB', requiredEsN0: 'dB', receiverThreshold: 'dBm', netRate: 'Mbit/s', spectralEfficiency: 'bit/s/Hz' })
  })

  it('a filter shows the rows that meet it and counts them', async () => {
    await open(psk8, qam16, { name: '32-PSK', family: 'psk', order: 32 })
    await page.getByRole('button', { name: 'Filter', exact: true }).click()
    await page.getByLabel('Value of the filter').fill('20')
    await untilColumn(page, 'name', names => names.join() === '8-PSK')
    await page.getByText('1 of 3 rows').waitFor()
    await page.getByLabel('Test').selectOption({ label: 'at least' })
    await untilColumn(page, 'name', names => names.join() === 'a 16-QAM,32-PSK')
    await page.getByRole('button', { name: 'Remove the filter on Required Es/N0' }).click()
    await untilColumn(page, 'name', names => names.length === 3)
    expect(complaints).toEqual([])
  })

  it('an edited row keeps its place until the reader sorts again', async () => {
    const [first] = await open(psk8, qam16)
    const sort = page.getByRole('button', { name: 'Sort by required Es/N0' })
    await sort.click()
    await untilColumn(page, 'requiredEsN0', texts => texts.join() === '19.12,20.92')
    await cell(first!, 'order').dblclick()
    await cell(first!, 'order').locator('input').fill('16')
    await page.keyboard.press('Enter')
    await untilColumn(page, 'requiredEsN0', texts => texts.join() === '24.97,20.92')
    await sort.click()
    await sort.click()
    await untilColumn(page, 'requiredEsN0', texts => texts.join() === '20.92,24.97')
    expect(complaints).toEqual([])
  })
})

describe('a long sweep', () => {
  it('shows its progress, and when it is stopped no row waits for numbers', async () => {
    await open()
    await page.getByRole('button', { name: 'Sweep…' }).first().click()
    const dialog = page.getByRole('dialog')
    await dialog.getByLabel('Values').fill('2 to 3 step 0.001')
    await dialog.getByRole('button', { name: 'Make 1,001 rows' }).click()
    await page.getByRole('list', { name: 'Sweeps in progress' }).getByRole('progressbar').waitFor()
    await page.getByRole('button', { name: 'Stop the sweep' }).click()
    await page.getByRole('list', { name: 'Sweeps in progress' }).waitFor({ state: 'detached' })
    const { body } = await owner.get<{ items: { state: string }[] }>(`/api/studies/${study.id}/candidates?limit=2000`)
    expect(body.items.length).toBeLessThan(1001)
    expect(body.items.filter(({ state }) => state === 'computing')).toEqual([])
    const sweeps = await owner.get<{ items: { state: string }[] }>(`/api/studies/${study.id}/sweeps`)
    expect(sweeps.body.items.map(({ state }) => state)).toEqual(['cancelled'])
    expect(complaints).toEqual([])
  })
})
