import { chromium } from 'playwright-core'
import type { Browser, BrowserContext, Page } from 'playwright-core'
import type { Candidate } from '#shared/schemas/candidates'
import type { Context, Measure, Row } from './measure'
import { newStudy, signedIn } from './support/signed-in'
import type { Call } from './support/signed-in'

const flags = ['--no-sandbox', '--disable-gpu', '--disable-quic', '--no-first-run', '--disable-background-networking', '--disable-component-update', '--disable-sync']

/** The value below which a part of some figures lies. */
function quantile(figures: number[], part: number): number {
  const sorted = figures.toSorted((a, b) => a - b)
  return sorted[Math.min(sorted.length - 1, Math.floor(part * sorted.length))] ?? Number.NaN
}

/** A browser's context with an empty cache, signed in as the demonstration's owner unless `signedOut`. */
async function contextOf(browser: Browser, { baseUrl, accounts }: Context, { signedOut = false, width = 1440, height = 900 } = {}): Promise<BrowserContext> {
  const context = await browser.newContext({ baseURL: baseUrl, locale: 'en-GB', viewport: { width, height } })
  if (!signedOut) {
    const { email, password } = accounts.find(({ role }) => role === 'owner')!
    const answer = await context.request.post('/api/session', { data: { email, password }, headers: { origin: baseUrl } })
    if (!answer.ok()) throw new Error(`The owner could not sign in: ${answer.status()}`)
  }
  return context
}

/** Waits until a page answers to clicks and keys. */
const interactive = (page: Page) =>
  page.waitForFunction(() => (window as { useNuxtApp?: () => { isHydrating?: boolean } }).useNuxtApp?.().isHydrating === false)

/**
 * Types an order into a row's cell and commits it by Enter.
 * @returns milliseconds, by the page's own clock, from that key until the row's new required Es/N0 is drawn
 */
async function editOnce(page: Page, row: string, order: number): Promise<number> {
  const cell = page.locator(`.ag-row[row-id="${row}"] [col-id="order"]`)
  await cell.dblclick()
  await cell.locator('input').fill(String(order))
  await page.evaluate((id) => {
    const number = () => document.querySelector(`.ag-row[row-id="${id}"] [col-id="requiredEsN0"]`)?.textContent ?? ''
    const before = number()
    const measured = new Promise<number>((resolve) => {
      let began = 0
      window.addEventListener('keydown', () => {
        began = performance.now()
      }, { capture: true, once: true })
      const watcher = new MutationObserver(() => {
        if (number() === before || !/^\d/.test(number())) return
        watcher.disconnect()
        requestAnimationFrame(() => resolve(performance.now() - began))
      })
      watcher.observe(document.querySelector('.candidates-grid')!, { subtree: true, childList: true, characterData: true })
    })
    Object.assign(window, { measured })
  }, row)
  await page.keyboard.press('Enter')
  return page.evaluate(() => (window as unknown as { measured: Promise<number> }).measured)
}

/** Edits of the order of a PSK and a hexagonal row, up to 256 points, one after another beside a pinned row and the close-up. */
async function editTimes(context: Context, browser: Browser, call: Call): Promise<Row[]> {
  const study = await newStudy(call, 'Edits in the browser')
  const { items } = await call<{ items: Candidate[] }>('POST', `/api/studies/${study}/candidates`, {
    items: [
      { name: 'phases', family: 'psk', order: 2, implementationLossDb: 0.41 }, { name: 'hexagons', family: 'hexagonal', order: 4, implementationLossDb: 0.41 },
      { name: 'reference', family: 'qam', order: 16, role: 'reference' },
    ],
  })
  await call('PUT', `/api/studies/${study}/pins`, { candidate: items[2]!.id, pinned: true })
  // Wide enough for the edited and the watched column to stand beside the overlay.
  const browsing = await contextOf(browser, context, { width: 2560, height: 1300 })
  const page = await browsing.newPage()
  await page.goto(`/studies/${study}/candidates`)
  await page.locator(`.ag-row[row-id="${items[2]!.id}"] [col-id="requiredEsN0"]`).getByText(/^\d/).waitFor()
  await page.getByRole('application', { name: /^SER against/ }).waitFor()
  const times: number[] = []
  for (const row of items.slice(0, 2)) {
    for (let order = 16; order <= 256; order += 8) times.push(await editOnce(page, row.id, order))
  }
  await browsing.close()
  const what = `one cell edited, M up to 256: from its Enter to the new numbers in the page, of ${times.length} edits`
  return [
    { what: `${what}: median`, figure: quantile(times, 0.5), unit: 'ms', target: 120 },
    { what: `${what}: 95 %`, figure: quantile(times, 0.95), unit: 'ms', target: 250 },
  ]
}

/** From pressing "Sign in" until the studies are listed and their commands answer, with an empty cache; the median of five. */
async function signInTime(context: Context, browser: Browser): Promise<Row> {
  const { email, password } = context.accounts.find(({ role }) => role === 'owner')!
  const times: number[] = []
  for (let i = 0; i < 5; i++) {
    const browsing = await contextOf(browser, context, { signedOut: true })
    const page = await browsing.newPage()
    await page.goto('/sign-in')
    await interactive(page)
    await page.getByLabel('E-mail address').fill(email)
    await page.getByLabel('Password').fill(password)
    const began = performance.now()
    await page.getByRole('button', { name: 'Sign in' }).click()
    await page.getByRole('button', { name: /^Commands for/ }).first().click()
    await page.getByRole('menu').waitFor()
    times.push((performance.now() - began) / 1000)
    await browsing.close()
  }
  return { what: 'first page after sign-in: from "Sign in" to a menu of the list open', figure: quantile(times, 0.5), unit: 's', target: 1.5 }
}

/** Compressed JavaScript that a page loads into an empty cache, and how long it takes until the page answers. */
async function pageWeight(context: Context, browser: Browser, name: string, path: string, target: number | null): Promise<Row[]> {
  const browsing = await contextOf(browser, context)
  const page = await browsing.newPage()
  const began = performance.now()
  await page.goto(path)
  await interactive(page)
  const seconds = (performance.now() - began) / 1000
  await page.waitForLoadState('networkidle')
  const bytes = await page.evaluate(() => performance.getEntriesByType('resource')
    .filter(entry => new URL(entry.name).pathname.endsWith('.js'))
    .reduce((sum, entry) => sum + (entry as PerformanceResourceTiming).encodedBodySize, 0))
  await browsing.close()
  return [
    { what: `${name}: from its address to interactive, empty cache`, figure: seconds, unit: 's', target },
    { what: `${name}: compressed JavaScript`, figure: bytes / 1000, unit: 'kB', target: 150 },
  ]
}

/** Scrolls 10,000 rows by one row's height and a half a frame for three seconds. */
async function scrolling(context: Context, browser: Browser, call: Call): Promise<Row[]> {
  const study = await newStudy(call, 'Ten thousand rows to scroll')
  for (let i = 0; i < 5; i++) {
    await call('POST', `/api/studies/${study}/candidates`, { items: Array.from({ length: 2000 }, (_, n) => ({ name: `row ${i * 2000 + n}` })) })
  }
  const browsing = await contextOf(browser, context)
  const page = await browsing.newPage()
  const began = performance.now()
  await page.goto(`/studies/${study}/candidates`)
  await page.locator('.ag-row [col-id="verdict"]').filter({ hasText: /^(?!computing)./ }).first().waitFor()
  const first = (performance.now() - began) / 1000
  await page.locator('[aria-rowcount="10001"]').waitFor()
  const all = (performance.now() - began) / 1000
  const frames = await page.locator('.ag-grid-viewport').evaluate(viewport => new Promise<number[]>((resolve) => {
    const times: number[] = []
    const step = (now: number) => {
      times.push(now)
      viewport.scrollTop += 45
      if (now - times[0]! < 3000) requestAnimationFrame(step)
      else resolve(times.slice(1).map((time, i) => time - times[i]!))
    }
    requestAnimationFrame(step)
  }))
  await browsing.close()
  return [
    { what: '10,000 rows: from the address to the first numbers', figure: first, unit: 's', target: null },
    { what: '10,000 rows: from the address until all are there', figure: all, unit: 's', target: null },
    { what: '10,000 rows scrolled: a frame on average', figure: frames.reduce((sum, time) => sum + time, 0) / frames.length, unit: 'ms', target: 20 },
    { what: '10,000 rows scrolled: a frame, 95 %', figure: quantile(frames, 0.95), unit: 'ms', target: null },
  ]
}

export default {
  title: 'edits, first page, weight and scrolling in Chromium',
  needs: 'browser',
  run: async (context) => {
    const call = await signedIn(context)
    const browser = await chromium.launch({ executablePath: context.chromium, args: flags })
    try {
      const ridge = (await call<{ items: { id: string, name: string }[] }>('GET', '/api/studies')).items.find(({ name }) => name.startsWith('Ridge'))!
      return [
        ...await editTimes(context, browser, call),
        await signInTime(context, browser),
        ...await pageWeight(context, browser, 'the list of studies', '/studies', 1.5),
        ...await pageWeight(context, browser, 'the requirements', `/studies/${ridge.id}/requirements`, null),
        ...await scrolling(context, browser, call),
      ]
    } finally {
      await browser.close()
    }
  },
} satisfies Measure
