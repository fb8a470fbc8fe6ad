import { chromium } from 'playwright-core'
import type { Browser, BrowserContextOptions, Page } from 'playwright-core'
import { inject } from 'vitest'
import { accountOf } from './client'

const flags = [
  '--no-sandbox', '--disable-gpu', '--disable-quic', '--no-first-run', '--disable-background-networking', '--disable-component-update',
  '--disable-sync',
]

/** A page of a browser context of its own, and what went wrong on it so far. */
export interface WatchedPage {
  page: Page
  /** console errors and warnings, uncaught exceptions and refused requests, each as one line: expect it to equal [] */
  complaints: string[]
}

/** Launches Debian's Chromium; close it in afterAll. */
export const launchBrowser = (): Promise<Browser> => chromium.launch({ executablePath: inject('chromium'), args: flags })

/**
 * Opens a page in a fresh context.
 * @param role the demonstration's account to be signed in as; nobody when left out
 * @param options of the context, such as `colorScheme: 'dark'`
 */
export async function openPage(browser: Browser, role?: string, options: BrowserContextOptions = {}): Promise<WatchedPage> {
  const baseURL = inject('baseUrl')
  const context = await browser.newContext({ baseURL, locale: 'en-GB', viewport: { width: 1440, height: 900 }, acceptDownloads: true, ...options })
  if (role) {
    const { email, password } = accountOf(role)
    const answer = await context.request.post('/api/session', { data: { email, password }, headers: { origin: baseURL } })
    if (!answer.ok()) throw new Error(`${email} could not sign in: ${answer.status()} ${await answer.text()}`)
  }
  const page = await context.newPage()
  return { page, complaints: watch(page) }
}

function watch(page: Page): string[] {
  const complaints: string[] = []
  page.on('pageerror', error => complaints.push(`exception: ${error.message}`))
  page.on('console', (message) => {
    if (message.type() === 'error' || message.type() === 'warning') complaints.push(`console ${message.type()}: ${message.text()}`)
  })
  return complaints
}
