import { readFile } from 'node:fs/promises'
import ExcelJS from 'exceljs'
import type { Browser, Page } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { launchBrowser, openPage } from '../support/browser'
import { accountOf } from '../support/client'
import { cell, columnTexts, numberOf, untilColumn, wide } from './grid-of-page'

let browser: Browser
let page: Page
let complaints: string[]
beforeAll(async () => {
  browser = await launchBrowser()
  const opened = await openPage(browser, undefined, { viewport: wide })
  page = opened.page
  complaints = opened.complaints
})
afterAll(() => browser.close())

/** The sheet of a downloaded workbook as rows of values, formulas as their results. */
const valuesOf = (sheet: ExcelJS.Worksheet) => sheet.getSheetValues().slice(1).map(row => (row as ExcelJS.CellValue[]).slice(1)
  .map(value => typeof value === 'object' && value !== null && 'formula' in value ? value.result as number : value))

// One person's way through the product, step by step: each step starts where the one before has ended.
describe.sequential('from sign-in to the exported trade study', () => {
  it('signs in', async () => {
    const { email, password } = accountOf('owner')
    await page.goto('/sign-in')
    await page.getByLabel('E-mail address').fill(email)
    await page.getByLabel('Password').fill(password)
    await page.getByRole('button', { name: 'Sign in' }).click()
    await page.waitForURL('**/studies')
  })

  it('makes a study', async () => {
    await page.getByRole('button', { name: 'New study' }).click()
    const dialog = page.getByRole('dialog')
    await dialog.getByLabel(/name/i).fill('Story of a link')
    await dialog.getByRole('button', { name: /create|make|new/i }).click()
    await page.getByRole('heading', { name: 'Story of a link' }).waitFor()
    await page.getByRole('link', { name: 'Candidates' }).click()
    await page.getByRole('button', { name: 'Sweep…' }).first().click()
  })

  it('says how many rows a sweep makes before it starts, and makes them', async () => {
    const dialog = page.getByRole('dialog')
    await dialog.getByLabel('Values').fill('2.0 to 3.2 step 0.1')
    await dialog.getByText('13 rows', { exact: true }).waitFor()
    await dialog.getByRole('button', { name: 'Make 13 rows' }).click()
    const required = await untilColumn(page, 'requiredEsN0', texts => texts.length === 13 && texts.every(text => /^\d+\.\d\d$/.test(text)))
    expect(required).toHaveLength(13)
  })

  it('sorts by required Es/N0', async () => {
    await page.getByRole('button', { name: 'Sort by required Es/N0' }).click()
    const sorted = await untilColumn(page, 'requiredEsN0', (texts) => {
      const numbers = texts.map(numberOf)
      return numbers.length === 13 && numbers.every((value, i) => i === 0 || numbers[i - 1]! <= value)
    })
    // 4+12 APSK needs least where the rings' spacings balance: ETSI's ratios for uncoded-like high rates, 2.57 to 2.7, lie close by.
    expect(numberOf(sorted[0]!)).toBeLessThan(21.45)
  })

  it('pins three rows into the overlay', async () => {
    const names = (await columnTexts(page, 'name')).slice(0, 3)
    for (const name of names) {
      await (await cell(page, name, 'name')).click()
      await page.getByRole('button', { name: 'Pin', exact: true }).click()
      await page.getByRole('button', { name: 'Unpin', exact: true }).waitFor()
    }
    const overlay = page.getByRole('region', { name: /overlay/i })
    for (const name of names) await overlay.getByText(name, { exact: true }).first().waitFor()
    await overlay.getByRole('button', { name: 'Show as table' }).click()
    await overlay.getByRole('table').filter({ hasText: names[0] }).first().waitFor()
    await overlay.getByRole('button', { name: /show as drawing|show the drawing|drawing/i }).click()
  })

  it('exports a workbook that says what the page says', async () => {
    const shown = {
      names: await columnTexts(page, 'name'), required: await columnTexts(page, 'requiredEsN0'),
      ebN0: await columnTexts(page, 'requiredEbN0'), verdicts: await columnTexts(page, 'verdict'),
    }
    await page.getByRole('button', { name: 'Export' }).click()
    const [download] = await Promise.all([page.waitForEvent('download'), page.getByRole('menuitem', { name: 'XLSX workbook' }).click()])
    const workbook = new ExcelJS.Workbook()
    await workbook.xlsx.load((await readFile(await download.path())).buffer as ArrayBuffer)
    expect(workbook.worksheets.map(sheet => sheet.name)).toEqual(['Summary', 'Link cases', 'Candidates', 'Curves', 'Constellations', 'Methods', 'Cautions'])

    const [titles = [], , ...rows] = valuesOf(workbook.getWorksheet('Candidates')!)
    const at = (title: string) => titles.indexOf(title)
    const row = (name: string) => rows.find(values => values[at('Name')] === name)!
    shown.names.forEach((name, i) => {
      expect((row(name)[at('Required Es/N0')] as number).toFixed(2)).toBe(shown.required[i])
      expect((row(name)[at('Required Eb/N0')] as number).toFixed(2)).toBe(shown.ebN0[i])
      expect(row(name)[at('Verdict')]).toBe(shown.verdicts[i])
    })
    const curves = valuesOf(workbook.getWorksheet('Curves')!).slice(2)
    expect(new Set(curves.map(values => values[0]))).toEqual(new Set(shown.names.slice(0, 3)))
  })

  it('has left no complaint in the console', () => expect(complaints).toEqual([]))
})
