import type { Browser, Page } from 'playwright-core'
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import type { Candidate, CandidateChange } from '#shared/schemas/candidates'
import { launchBrowser, openPage } from '../support/browser'
import { signIn } from '../support/client'
import type { Client } from '../support/client'
import { columnTexts, untilColumn, wide } from './grid-of-page'
import { cellAt, openCandidates, rowNow, studyWith } from './study-of-page'

let browser: Browser
let owner: Client
let row: Candidate
let page: Page
let complaints: string[]
/** Changes that the page has sent. */
let sent: CandidateChange[]
beforeAll(async () => {
  browser = await launchBrowser()
  owner = await signIn('owner')
})
afterAll(() => browser.close())

/** A page on a fresh study with one row of 16-QAM, in each test's own context. */
beforeEach(async () => {
  const study = await studyWith(owner, 'Presets', [{ family: 'qam', order: 16 }])
  row = study.rows[0]!
  const opened = await openPage(browser, 'owner', { viewport: wide })
  page = opened.page
  complaints = opened.complaints
  sent = []
  page.on('request', (request) => {
    if (request.method() === 'PATCH') sent.push(request.postDataJSON() as CandidateChange)
  })
  await openCandidates(page, study)
  return () => page.context().close()
})

const option = (title: string) => page.getByRole('option', { name: title, exact: true })

/** Opens the editor of the row's rings from the keyboard. */
async function openRings() {
  await cellAt(page, row.id, 'rings').click()
  await page.keyboard.press('Enter')
  await page.getByRole('combobox', { name: 'Rings/ratios' }).waitFor()
}

describe('a ring set of the standard in the grid', () => {
  it('is taken by the keyboard alone, in one change', async () => {
    await openRings()
    for (let n = 0; n < 6; n++) await page.keyboard.press('ArrowDown')
    expect(await option('4+12 at 2.57 (ETSI 16-APSK 9/10)').getAttribute('aria-selected')).toBe('true')
    await page.keyboard.press('Enter')
    // The demonstration's row of these rings: 21.41 dB at SER 1e-6.
    expect(await untilColumn(page, 'requiredEsN0', ([text]) => text === '21.41')).toEqual(['21.41'])
    expect([...await columnTexts(page, 'family'), ...await columnTexts(page, 'order'), ...await columnTexts(page, 'rings')])
      .toEqual(['APSK', '16', '4+12 at 2.57'])
    expect(sent).toEqual([{ family: 'apsk', order: 16, rings: [4, 12], ratios: [2.57], phasesDeg: [45, 15] }])
    expect(complaints).toEqual([])
  })
  it('is taken by mouse, from the last with both its ratios and its phases', async () => {
    await openRings()
    await option('4+12+16 at 2.53, 4.30 (ETSI 32-APSK 9/10)').click()
    await untilColumn(page, 'rings', ([text]) => text === '4+12+16 at 2.53, 4.3')
    await expect.poll(async () => (await rowNow(owner, row.id)).inputs.phasesDeg).toEqual([45, 15, 0])
    expect(complaints).toEqual([])
  })
  it('is left with one Escape', async () => {
    await openRings()
    await page.keyboard.press('ArrowUp')
    await page.keyboard.press('Escape')
    await page.getByRole('listbox').waitFor({ state: 'detached' })
    expect([await columnTexts(page, 'rings'), sent]).toEqual([[''], []])
  })
  it('is no more than a start for free entry', async () => {
    await openRings()
    await page.keyboard.press('ArrowDown')
    await page.keyboard.press('Backspace')
    await page.keyboard.type('9')
    await page.keyboard.press('Enter')
    await untilColumn(page, 'rings', ([text]) => text === '4+12 at 3.19')
    await expect.poll(() => sent).toEqual([{ family: 'apsk', rings: [4, 12], ratios: [3.19] }])
  })
  it('is named where its row asks why', async () => {
    await openRings()
    await page.keyboard.press('ArrowDown')
    await page.keyboard.press('Enter')
    await untilColumn(page, 'rings', ([text]) => text === '4+12 at 3.15')
    await cellAt(page, row.id, 'rings').click()
    await page.keyboard.press('Alt+w')
    await page.getByText('It is 16-APSK 2/3 of ETSI EN 302 307-1.').waitFor()
  })
  it('stays where a text is refused', async () => {
    await openRings()
    await page.keyboard.type('4+twelve')
    await page.keyboard.press('Enter')
    await cellAt(page, row.id, 'rings').click()
    await page.getByText('Enter rings and ratios as 4+12 at 2.57, or 4+12+16 at 2.53, 4.30.').first().waitFor()
    expect(await columnTexts(page, 'rings')).toEqual(['4+twelve'])
    await page.keyboard.press('Enter')
    expect(await page.getByRole('combobox', { name: 'Rings/ratios' }).inputValue()).toBe('4+twelve')
  })
})

describe('a sweep of the standard\'s ring sets', () => {
  beforeEach(async () => {
    await page.getByRole('button', { name: 'Sweep…' }).first().click()
    await page.getByRole('dialog').getByLabel('Parameter').selectOption({ label: 'ETSI APSK rings' })
  })

  it('counts its rows before it starts, and makes one of each', async () => {
    const dialog = page.getByRole('dialog')
    await dialog.getByRole('button', { name: 'Tick all of 16-APSK' }).click()
    await dialog.getByText('6 rows', { exact: true }).waitFor()
    await dialog.getByRole('button', { name: 'Tick all of 32-APSK' }).click()
    await dialog.getByText('11 rows', { exact: true }).waitFor()
    await dialog.getByLabel('16-APSK 2/3 at 3.15').uncheck()
    await dialog.getByRole('button', { name: 'Make 10 rows' }).click()
    const rings = await untilColumn(page, 'rings', texts => texts.length === 11)
    expect(rings.slice(1)).toEqual([
      '4+12 at 2.85', '4+12 at 2.75', '4+12 at 2.7', '4+12 at 2.6', '4+12 at 2.57',
      '4+12+16 at 2.84, 5.27', '4+12+16 at 2.72, 4.87', '4+12+16 at 2.64, 4.64', '4+12+16 at 2.54, 4.33', '4+12+16 at 2.53, 4.3',
    ])
    const required = await untilColumn(page, 'requiredEsN0', texts => texts.every(text => /^\d+\.\d\d$/.test(text)))
    expect(required[5]).toBe('21.41')
    expect(complaints).toEqual([])
  })
  it('offers nothing of what they set to be varied beside them', async () => {
    const dialog = page.getByRole('dialog')
    await dialog.getByRole('button', { name: 'Vary one more parameter' }).click()
    const second = dialog.getByLabel('Parameter').nth(1)
    expect(await second.locator('option').allTextContents()).not.toContain('First ring ratio')
    expect(await dialog.getByLabel('Rings/ratios').count()).toBe(0)
  })
})
