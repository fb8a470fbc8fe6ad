import { writeFile } from 'node:fs/promises'
import { fileURLToPath } from 'node:url'
import { expect, it } from 'vitest'
import type { StudySummary } from '#shared/schemas/studies'
import { launchBrowser, openPage } from '../support/browser'
import { signIn } from '../support/client'

/** The README's picture; written only where README_PICTURE=1 asks for it, so that a test run changes no file. */
const picture = fileURLToPath(new URL('../../public/screenshot.png', import.meta.url))

it('draws the demonstration study', async () => {
  const { body } = await (await signIn('owner')).get<{ items: StudySummary[] }>('/api/studies')
  const study = body.items.find(({ name }) => name === 'Ridge station to valley gateway')!
  const browser = await launchBrowser()
  const { page, complaints } = await openPage(browser, 'owner', { viewport: { width: 1600, height: 1000 }, colorScheme: 'light' })
  await page.goto(`/studies/${study.id}/candidates`)
  await page.locator('.ag-row [col-id="name"]').getByText('4+12 at 2.57', { exact: true }).click()
  await page.getByRole('heading', { name: /close-up.*4\+12 at 2\.57/i }).waitFor()
  await page.locator('svg path').first().waitFor()
  const image = await page.screenshot({ animations: 'disabled' })
  // A blank sheet of this size compresses to a few kilobytes.
  expect(image.length).toBeGreaterThan(60_000)
  expect(complaints).toEqual([])
  if (process.env.README_PICTURE === '1') await writeFile(picture, image)
  await browser.close()
})
