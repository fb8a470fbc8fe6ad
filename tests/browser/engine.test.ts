import type { Browser, Page } from 'playwright-core'
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import type { Candidate } from '#shared/schemas/candidates'
import { launchBrowser, openPage } from '../support/browser'
import { signIn } from '../support/client'
import type { Client } from '../support/client'
import { cell, numberOf, untilColumn, wide } from './grid-of-page'
import { namesOf, openCandidates, studyWith } from './study-of-page'
import type { OwnStudy } from './study-of-page'

let browser: Browser
let owner: Client
let study: OwnStudy
let page: Page
let complaints: string[]

beforeAll(async () => {
  browser = await launchBrowser()
  owner = await signIn('owner')
})
afterAll(() => browser.close())

beforeEach(async () => {
  study = await studyWith(owner, 'Engine under test', [
    { name: 'gray', family: 'qam', order: 16 },
    { name: 'natural', family: 'qam', order: 16, labelling: 'natural' },
    { name: 'twelve', family: 'psk', order: 12 },
    { name: 'shaped', family: 'qam', order: 16, probabilityRule: 'shaped', shapedEntropy: 3.5 },
  ])
  for (const { id } of study.rows) await owner.put(`/api/studies/${study.id}/pins`, { candidate: id, pinned: true })
  const opened = await openPage(browser, 'owner', { viewport: wide })
  page = opened.page
  complaints = opened.complaints
  await openCandidates(page, study)
  return () => page.context().close()
})

async function show(...columns: string[]) {
  await page.getByRole('button', { name: 'Columns', exact: true }).click()
  for (const column of columns) await page.getByRole('checkbox', { name: column, exact: true }).check()
  await page.getByRole('button', { name: 'Done' }).click()
}
const power = /^\d\.\d\de−?\d+$/
const value = (text: string) => Number(text.replace('−', '-'))
const overlay = () => page.getByRole('region', { name: 'Overlay', exact: true })
const draw = (quantity: string) => overlay().getByLabel('Quantity drawn').selectOption({ label: quantity })
const legend = (name: string) => overlay().getByRole('region', { name: 'Legend and values at the cross-hair' }).getByRole('row').filter({ hasText: name })

describe('columns that are computed when they are shown', () => {
  it('bring bit error rates, and fail alone where a row has no labels', async () => {
    await show('BER at available, exact')
    const texts = await untilColumn(page, 'berExact', ([gray, natural, twelve]) => power.test(gray ?? '') && power.test(natural ?? '') && twelve === 'failed')
    // Gray labels of 16-QAM make the fewest wrong bits a symbol error.
    expect(value(texts[0]!)).toBeLessThan(value(texts[1]!))
    await (await cell(page, 'twelve', 'berExact')).click()
    await page.getByText('A bit error rate needs labels').first().waitFor()
    expect(complaints).toEqual([])
  })
  it('are there for every row when rows are sorted by one', async () => {
    await show('Mutual information at available, bit/symbol')
    await page.locator('.ag-header-cell[col-id="mutualInformation"]').click()
    const rates = (await untilColumn(page, 'mutualInformation', texts => texts.every(text => /^\d\.\d{3}$/.test(text)))).map(numberOf)
    expect(rates).toEqual([...rates].sort((a, b) => a - b))
  })
})

describe('the overlay', () => {
  it('draws bit error rates, and says why a row has none', async () => {
    await draw('BER')
    await page.getByRole('application', { name: 'BER against Es/N0 of 3 pinned rows' }).waitFor()
    await legend('twelve').getByText(/^No curve\. /).waitFor()
    expect(complaints.filter(line => !line.includes('422'))).toEqual([])
  })
  it('draws information rates below capacity, in the table too', async () => {
    await draw('information rate')
    await page.getByRole('application', { name: /^Rate against Es\/N0/ }).getByText('capacity').waitFor()
    await overlay().getByRole('button', { name: 'Show as table' }).click()
    const line = overlay().getByRole('row').filter({ has: page.getByRole('rowheader', { name: '0.00', exact: true }) })
    // One bit a symbol is the capacity of two dimensions at 0 dB.
    const [mutualInformation, bitMetricRate] = (await line.getByRole('cell').allTextContents()).map(numberOf)
    expect([mutualInformation! < 1, mutualInformation! > 0.95, bitMetricRate! < mutualInformation!]).toEqual([true, true, true])
  })
})

describe('the close-up', () => {
  it('shows labels, how often a point is mistaken, and what each neighbour makes of the bound', async () => {
    await (await cell(page, 'gray', 'name')).click()
    const closeUp = page.getByRole('region', { name: /^Close-up/ })
    await closeUp.getByRole('checkbox', { name: 'Labels' }).check()
    const drawing = closeUp.getByRole('application')
    await drawing.getByText('0000', { exact: true }).waitFor()
    await drawing.focus()
    await page.keyboard.press('Home')
    await closeUp.getByText(/^Point 0: .*label \d{4}; mistaken with probability \d\.\d\de−\d+ at the available/).waitFor()
    const shares = closeUp.getByRole('table', { name: 'Relevant neighbours of point 0' }).locator('tbody td:last-child')
    const sum = (await shares.allTextContents()).reduce((total, text) => total + Number(text), 0)
    expect(sum).toBeCloseTo(100, 1)
  })
})

describe('a search of labels', () => {
  it('ends with a row of a lower bit error rate behind its origin', async () => {
    await show('BER at available, exact')
    await (await cell(page, 'natural', 'name')).click()
    await page.getByRole('button', { name: '1 row' }).click()
    await page.getByRole('menuitem', { name: 'Search labels…' }).click()
    await page.getByRole('button', { name: 'Start the search' }).click()
    await page.getByText(/^Search of labels for natural has ended: /).waitFor({ timeout: 60_000 })
    const texts = await untilColumn(page, 'berExact', found => found.length === 5 && power.test(found[2] ?? ''))
    expect(value(texts[2]!)).toBeLessThan(value(texts[1]!))
    expect((await namesOf(owner, study.id)).indexOf('natural')).toBe(1)
    const { body } = await owner.get<{ items: Candidate[] }>(`/api/studies/${study.id}/candidates`)
    expect(body.items[2]!.inputs.labelling).toBe('own')
  })
})
