import { readFile } from 'node:fs/promises'
import Papa from 'papaparse'
import type { Browser, Download, Page } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { CandidateConstellation, CandidateCurves } from '#shared/schemas/values'
import { launchBrowser, openPage } from '../support/browser'
import { signIn } from '../support/client'
import type { Client } from '../support/client'
import { cellAt, openCandidates, studyWith } from './study-of-page'
import type { OwnStudy } from './study-of-page'

let browser: Browser
let page: Page
let complaints: string[]
let owner: Client
let study: OwnStudy

const rows = [
  { name: 'two', family: 'psk', order: 2 },
  { name: 'four', family: 'psk', order: 4 },
  { name: 'sixteen', family: 'qam', order: 16 },
] as const

beforeAll(async () => {
  browser = await launchBrowser()
  owner = await signIn('owner')
  study = await studyWith(owner, 'Overlay under test', [...rows])
  for (const { id } of study.rows) await owner.put(`/api/studies/${study.id}/pins`, { candidate: id, pinned: true })
  const opened = await openPage(browser, 'owner', { viewport: { width: 1900, height: 1200 } })
  page = opened.page
  complaints = opened.complaints
  await openCandidates(page, study)
  await drawing().waitFor()
})
afterAll(() => browser.close())

const overlay = () => page.getByRole('region', { name: 'Overlay', exact: true })
const drawing = () => page.getByRole('application', { name: /^SER against/ })
/** Labels under the SNR axis and beside the error axis, as drawn. */
const lettering = () => drawing().locator('text').allTextContents()
const table = () => page.getByRole('region', { name: 'Numbers of the overlay' }).getByRole('table')
/** A line of the table of numbers: SNR, then bound, approximation and exact rate of each row. */
const tableLine = async (snr: string) => {
  const line = table().getByRole('row').filter({ has: page.getByRole('rowheader', { name: snr, exact: true }) })
  return line.getByRole('cell').allTextContents()
}
const save = async (section: string, kind: string): Promise<Download> => {
  await page.getByRole('region', { name: section }).getByRole('button', { name: 'Save', exact: true }).click()
  const [download] = await Promise.all([page.waitForEvent('download'), page.getByRole('menuitem', { name: kind }).click()])
  return download
}
const fileOf = async (download: Download) => readFile(await download.path())

describe('the drawing', () => {
  it('names every pinned row at its curve and in the legend, with a marker each', async () => {
    const written = await lettering()
    expect(rows.map(({ name }) => written.some(text => text.trim() === name))).toEqual([true, true, true])
    const legend = page.getByRole('region', { name: 'Legend and values at the cross-hair' })
    expect(await legend.getByRole('rowheader').allTextContents().then(texts => texts.map(text => text.trim()))).toEqual(['two', 'four', 'sixteen'])
  })

  it('has the powers of ten on its error axis and the target line', async () => {
    const written = (await lettering()).map(text => text.trim())
    expect(written.find(text => text.startsWith('target'))).toBe('target 10⁻⁶')
  })

  it('hidden kinds of lines are no longer drawn', async () => {
    const lines = () => drawing().locator('g[clip-path] > path').count()
    const all = await lines()
    expect(all).toBe(9)
    await page.getByLabel(/bound/i).first().uncheck()
    await expect.poll(lines).toBe(6)
    await page.getByLabel(/bound/i).first().check()
    await expect.poll(lines).toBe(9)
  })

  it('arrow keys move a cross-hair whose values stand in the legend', async () => {
    await drawing().focus()
    await page.keyboard.press('ArrowRight')
    await overlay().getByText(/Es\/N0 .* dB, SER exact: two /).waitFor({ state: 'attached' })
    const legend = page.getByRole('region', { name: 'Legend and values at the cross-hair' })
    await expect.poll(async () => (await legend.getByRole('row').last().getByRole('cell').first().textContent())?.trim()).toMatch(/^\d\.\d\de[−-]\d+$/)
    await page.keyboard.press('Escape')
  })

  it('magnifies by keys, buttons and a drawn box, and shows the whole range again', async () => {
    const whole = page.getByRole('button', { name: 'Whole range' })
    const before = await lettering()
    expect(await whole.isDisabled()).toBe(true)
    await page.getByRole('button', { name: 'Magnify' }).click()
    await expect.poll(() => whole.isDisabled()).toBe(false)
    expect(await lettering()).not.toEqual(before)
    await drawing().focus()
    await page.keyboard.press('0')
    await expect.poll(() => whole.isDisabled()).toBe(true)
    expect(await lettering()).toEqual(before)
    const box = (await drawing().boundingBox())!
    await page.mouse.move(box.x + box.width * 0.4, box.y + box.height * 0.3)
    await page.mouse.down()
    await page.mouse.move(box.x + box.width * 0.6, box.y + box.height * 0.6, { steps: 4 })
    await page.mouse.up()
    await expect.poll(() => whole.isDisabled()).toBe(false)
    await whole.click()
    await expect.poll(lettering).toEqual(before)
  })

  it('against Eb/N0 a row of two bits moves by 3.01 dB, a row of one bit stays', async () => {
    await overlay().getByRole('button', { name: 'Show as table' }).click()
    const axis = async () => (await table().getByRole('columnheader').first().textContent())?.trim()
    await expect.poll(axis).toBe('Es/N0, dB')
    const [oneBit, , , twoBits] = await tableLine('7.00')
    await page.getByLabel('SNR axis').selectOption({ label: 'against Eb/N0' })
    await expect.poll(axis).toBe('Eb/N0, dB')
    expect([(await tableLine('7.00'))[0], (await tableLine('3.99'))[3]]).toEqual([oneBit, twoBits])
    await page.getByLabel('SNR axis').selectOption({ label: 'against Es/N0' })
    await overlay().getByRole('button', { name: 'Show as drawing' }).click()
    await drawing().waitFor()
  })

  it('its table has the numbers that the server computed', async () => {
    await overlay().getByRole('button', { name: 'Show as table' }).click()
    const { body } = await owner.get<CandidateCurves>(`/api/candidates/${study.rows[2]!.id}/curves`)
    const at = body.esN0Db.indexOf(12)
    const cells = await tableLine('12.00')
    expect(cells).toHaveLength(9)
    const shown = cells.slice(6).map(text => Number(text.replace('−', '-')))
    expect(shown.toSorted()).toEqual([body.serUnion[at]!, body.serNearest[at]!, body.serExact[at]!].map(rate => Number(rate.toPrecision(3))).toSorted())
    await overlay().getByRole('button', { name: 'Show as drawing' }).click()
    await drawing().waitFor()
  })

  it('leaves no complaint in the console', () => expect(complaints).toEqual([]))
})

describe('saving', () => {
  it('as SVG: a drawing that needs nothing else, with the rows\' names', async () => {
    const download = await save('Overlay', 'Drawing as SVG')
    expect(download.suggestedFilename()).toBe('overlay-ser-esN0.svg')
    const text = (await fileOf(download)).toString('utf8')
    const found = await page.evaluate((source) => {
      const parsed = new DOMParser().parseFromString(source, 'image/svg+xml')
      return {
        root: parsed.documentElement.nodeName, title: parsed.querySelector('title')?.textContent, paths: parsed.querySelectorAll('path').length,
        outside: parsed.querySelectorAll('[href], [class], style, script').length,
        texts: [...parsed.querySelectorAll('text')].map(element => element.textContent?.trim()),
      }
    }, text)
    expect(found).toMatchObject({ root: 'svg', title: 'SER against Es/N0', outside: 0 })
    expect(found.texts).toEqual(expect.arrayContaining(['two', 'four', 'sixteen', 'target 10⁻⁶']))
    expect(text).not.toMatch(/var\(--|NaN/)
  })

  it('as PNG: a picture of twice the drawing\'s size', async () => {
    const download = await save('Overlay', 'Drawing as PNG')
    const bytes = await fileOf(download)
    expect(bytes.subarray(0, 8).toString('latin1')).toBe('\x89PNG\r\n\x1A\n')
    const width = await drawing().evaluate(element => element.clientWidth)
    expect(bytes.readUInt32BE(16)).toBe(2 * width)
    expect(bytes.length).toBeGreaterThan(20_000)
  })

  it('as CSV: every computed point of every pinned row, in full', async () => {
    const download = await save('Overlay', 'Numbers as CSV')
    const { data, errors } = Papa.parse<Record<string, string>>((await fileOf(download)).toString('utf8'), { header: true, skipEmptyLines: true })
    expect(errors).toEqual([])
    const { body } = await owner.get<CandidateCurves>(`/api/candidates/${study.rows[1]!.id}/curves`)
    const own = data.filter(line => line.Name === 'four')
    expect(data).toHaveLength(3 * 41)
    expect(own.map(line => Number(line['Es/N0, dB']))).toEqual(body.esN0Db)
    expect(own.map(line => Number(line['SER, exact']))).toEqual(body.serExact)
    expect(Number(own[0]!['Eb/N0, dB'])).toBeCloseTo(-10 * Math.log10(2), 12)
  })
})

describe('the close-up', () => {
  const shown = () => page.getByRole('region', { name: /^Close-up/ })
  const words = () => shown().locator('p[aria-live="polite"]')

  it('draws the selected row and says a point\'s neighbours in words', async () => {
    await cellAt(page, study.rows[1]!.id, 'name').click()
    await shown().getByRole('heading', { name: 'Close-up: four' }).waitFor()
    const constellation = shown().getByLabel('Constellation of four: 4 points')
    await constellation.waitFor()
    await constellation.focus()
    await page.keyboard.press('ArrowRight')
    // QPSK at unit mean energy: two neighbours at √2, both nearest
    await words().filter({ hasText: /1\.414/ }).waitFor()
    const { body } = await owner.get<CandidateConstellation>(`/api/candidates/${study.rows[1]!.id}/constellation`)
    expect(body.neighbours.map(list => list.length)).toEqual([2, 2, 2, 2])
    expect(await shown().getByRole('table', { name: /^Relevant neighbours of point/ }).getByRole('row').count()).toBe(3)
  })

  it('follows the selection', async () => {
    await cellAt(page, study.rows[2]!.id, 'name').click()
    await shown().getByLabel('Constellation of sixteen: 16 points').waitFor()
    await shown().getByText('0.632').first().waitFor()
  })

  it('saves its drawing', async () => {
    const download = await save('Close-up: sixteen', 'Drawing as SVG')
    expect(download.suggestedFilename()).toBe('constellation-sixteen.svg')
    expect((await fileOf(download)).toString('utf8')).not.toMatch(/var\(--|NaN/)
  })

  it('leaves no complaint in the console', () => expect(complaints).toEqual([]))
})
