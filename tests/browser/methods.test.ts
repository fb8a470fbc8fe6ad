import { readdir, readFile } from 'node:fs/promises'
import { readFileSync } from 'node:fs'
import { join } from 'node:path'
import type { Browser, Page } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, inject, it } from 'vitest'
import { methodIds, methods } from '#shared/methods'
import { checks } from '#shared/methods/checks'
import { launchBrowser, openPage } from '../support/browser'
import { openReady } from './study-of-page'

let browser: Browser
beforeAll(async () => {
  browser = await launchBrowser()
})
afterAll(() => browser.close())

const computedCells = (page: Page) => page.locator('tbody td:nth-child(3)').allInnerTexts()
const allComputed = (page: Page) => page.getByText('meets them all').waitFor({ timeout: 60_000 })

describe.each(['light', 'dark'])('the Methods page on the %s sheet', (sheet) => {
  let page: Page
  let complaints: string[]
  const fonts: string[] = []
  beforeAll(async () => {
    const opened = await openPage(browser, 'observer', { viewport: { width: 1024, height: 800 } })
    ;({ page, complaints } = opened)
    await page.context().addCookies([{ name: 'sheet', value: sheet, url: inject('baseUrl') }])
    page.on('requestfinished', (request) => {
      if (request.resourceType() === 'font') fonts.push(request.url())
    })
    await openReady(page, '/methods')
    await allComputed(page)
  })
  afterAll(() => page.context().close())

  it('shows every method with its formulas', async () => {
    expect(await page.locator('article').evaluateAll(articles => articles.map(({ id }) => id))).toEqual(methodIds)
    expect(await page.locator('.methods-formula .katex-display').count()).toBe(methodIds.reduce((sum, id) => sum + methods[id].formulas.length, 0))
  })
  it('shows what the build computes beside every published value', async () => {
    const cells = await computedCells(page)
    expect([cells.length, cells.filter(text => !/\d/.test(text))]).toEqual([checks.length, []])
  })
  it('does not scroll sideways at 1024 px', async () => {
    expect(await page.evaluate(() => document.documentElement.scrollWidth)).toBeLessThanOrEqual(1024)
  })
  it('lets the keyboard reach a formula that is wider than its place', async () => {
    await page.setViewportSize({ width: 480, height: 800 })
    const wide = page.getByRole('group', { name: 'Formula of Relevant neighbours' }).first()
    await wide.waitFor()
    expect(await wide.getAttribute('tabindex')).toBe('0')
    await page.setViewportSize({ width: 1024, height: 800 })
  })
  it('takes the formulas\' faces from the server itself', async () => {
    await page.evaluate(() => document.fonts.ready)
    const own = fonts.filter(url => url.includes('KaTeX'))
    expect(own.length).toBeGreaterThan(2)
    expect(own.filter(url => !url.startsWith(inject('baseUrl')))).toEqual([])
    expect(await page.evaluate(() => document.fonts.check('16px KaTeX_Main'))).toBe(true)
  })
  it('complains of nothing in the console', () => expect(complaints).toEqual([]))
})

describe('what the browser is sent', () => {
  it('holds no code of KaTeX', async () => {
    const [, entry = ''] = readFileSync(`/proc/${inject('serverPid')}/cmdline`, 'utf8').split('\0')
    const folder = join(entry, '..', '..', 'public', '_nuxt')
    const scripts = (await readdir(folder)).filter(name => name.endsWith('.js'))
    const found = await Promise.all(scripts.map(async name => /ParseError|renderToString|katex-mathml/.test(await readFile(join(folder, name), 'utf8')) ? [name] : []))
    expect([scripts.length > 0, found.flat()]).toEqual([true, []])
  })
})
