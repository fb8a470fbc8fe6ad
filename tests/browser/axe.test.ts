import { createRequire } from 'node:module'
import { readFile } from 'node:fs/promises'
import type { Browser, Page } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, inject, it } from 'vitest'
import type { StudySummary } from '#shared/schemas/studies'
import { launchBrowser, openPage } from '../support/browser'
import type { WatchedPage } from '../support/browser'
import { signIn } from '../support/client'

const axe = await readFile(createRequire(import.meta.url).resolve('axe-core/axe.min.js'), 'utf8')

let browser: Browser
let study: string
beforeAll(async () => {
  browser = await launchBrowser()
  const { body } = await (await signIn('owner')).get<{ items: StudySummary[] }>('/api/studies')
  study = body.items.find(({ name }) => name === 'Ridge station to valley gateway')!.id
})
afterAll(() => browser.close())

interface Finding { id: string, impact: string | null, nodes: { html: string }[] }

/** Serious and critical findings on the page as it is, each as its rule and the first element. */
async function findings(page: Page): Promise<string[]> {
  // The page's content security policy has no place for foreign scripts: this one comes in through the debugger.
  await page.evaluate(axe)
  const violations = await page.evaluate(async () => {
    const { axe } = window as unknown as { axe: { run: (options: object) => Promise<{ violations: Finding[] }> } }
    return (await axe.run({ resultTypes: ['violations'] })).violations
  })
  return violations.filter(({ impact }) => impact === 'serious' || impact === 'critical').map(({ id, nodes }) => `${id}: ${nodes[0]?.html.slice(0, 160)}`)
}

/** Pages by what each must show before it is looked at. */
const pages: [string, (study: string) => string, (page: Page) => Promise<unknown>][] = [
  ['studies', () => '/studies', page => page.getByRole('link', { name: 'Ridge station to valley gateway' }).waitFor()],
  ['requirements', id => `/studies/${id}/requirements`, page => page.getByText('C/N0').first().waitFor()],
  ['candidates', id => `/studies/${id}/candidates`, page => page.locator('.ag-row [col-id="verdict"]').first().waitFor()],
  ['members', id => `/studies/${id}/members`, page => page.getByText('Noor Castellane').first().waitFor()],
  ['history', id => `/studies/${id}/history`, page => page.getByText('created study').first().waitFor()],
  ['methods', () => '/methods', page => page.getByRole('heading', { name: 'Methods' }).waitFor()],
  ['account', () => '/account', page => page.getByRole('heading', { name: 'Account' }).waitFor()],
  ['a page that is not there', () => '/studies/nothing', page => page.getByRole('link').first().waitFor()],
]

describe.each(['light', 'dark'])('on the %s sheet', (sheet) => {
  /** A page in a context that has chosen the sheet. */
  const opened = async (role?: string): Promise<WatchedPage> => {
    const watched = await openPage(browser, role)
    await watched.page.context().addCookies([{ name: 'sheet', value: sheet, url: inject('baseUrl') }])
    return watched
  }

  let owner: WatchedPage
  beforeAll(async () => {
    owner = await opened('owner')
  })
  afterAll(() => owner.page.context().close())

  it('the sign-in page has no serious finding', async () => {
    const { page, complaints } = await opened()
    await page.goto('/sign-in')
    expect([await findings(page), complaints]).toEqual([[], []])
    await page.context().close()
  })

  it.each(pages)('%s: no serious finding', async (_, path, ready) => {
    await owner.page.goto(path(study))
    await ready(owner.page)
    expect(await findings(owner.page)).toEqual([])
  })

  it.each(['Sweep…', 'Columns'])('the dialog of %s has no serious finding', async (command) => {
    await owner.page.goto(`/studies/${study}/candidates`)
    await owner.page.locator('.ag-row [col-id="verdict"]').first().waitFor()
    await owner.page.getByRole('button', { name: command }).first().click()
    await owner.page.getByRole('dialog').waitFor()
    expect(await findings(owner.page)).toEqual([])
  })

  it.each(['Search labels…', 'Search parameters…'])('the dialog of %s has no serious finding', async (command) => {
    await owner.page.goto(`/studies/${study}/candidates`)
    await owner.page.locator('.ag-row [col-id="name"]').getByText('4+12 at 2.57', { exact: true }).click()
    await owner.page.getByRole('button', { name: '1 row' }).click()
    await owner.page.getByRole('menuitem', { name: command }).click()
    await owner.page.getByRole('dialog').waitFor()
    expect(await findings(owner.page)).toEqual([])
  })

  it('the overlay of information rates and the close-up of a point have no serious finding', async () => {
    await owner.page.goto(`/studies/${study}/candidates`)
    await owner.page.locator('.ag-row [col-id="name"]').getByText('4+12 at 2.57', { exact: true }).click()
    await owner.page.getByLabel('Quantity drawn').selectOption({ label: 'information rate' })
    await owner.page.getByRole('application', { name: /^Rate against/ }).waitFor()
    const drawing = owner.page.getByRole('application', { name: /^Constellation of/ })
    await drawing.focus()
    await owner.page.keyboard.press('Home')
    await owner.page.getByText(/^Point 0: /).waitFor()
    expect(await findings(owner.page)).toEqual([])
  })

  it('the administration has no serious finding', async () => {
    const { page } = await opened('admin')
    await page.goto('/administration')
    await page.getByRole('heading', { name: 'Administration' }).waitFor()
    expect(await findings(page)).toEqual([])
    await page.context().close()
  })

  it('no page has complained in the console, but for the one that is not there', () => {
    expect(owner.complaints.filter(line => !line.includes('404'))).toEqual([])
  })
})
