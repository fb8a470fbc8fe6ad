import type { Page } from 'playwright-core'
import { expect } from 'vitest'

/** Wide enough for every column on first opening to be drawn beside the overlay. */
export const wide = { width: 7000, height: 1000 }

/** Texts of the drawn cells of one column, from the first row down. */
export async function columnTexts(page: Page, column: string): Promise<string[]> {
  return page.locator(`.ag-row [col-id="${column}"]`).evaluateAll(cells => cells
    .map(cell => ({ at: Number(cell.closest('.ag-row')?.getAttribute('row-index')), text: cell.textContent?.trim() ?? '' }))
    .sort((a, b) => a.at - b.at)
    .map(({ text }) => text))
}

/** The cell of a column in the row of a candidate's name. */
export async function cell(page: Page, name: string, column: string) {
  const row = page.locator('.ag-row', { has: page.locator('[col-id="name"]').getByText(name, { exact: true }) }).first()
  const id = await row.getAttribute('row-id')
  return page.locator(`.ag-row[row-id="${id}"] [col-id="${column}"]`)
}

/** Waits until a column's texts hold what is asked of them. */
export async function untilColumn(page: Page, column: string, holds: (texts: string[]) => boolean): Promise<string[]> {
  await expect.poll(async () => holds(await columnTexts(page, column)), { timeout: 30_000, interval: 50 }).toBe(true)
  return columnTexts(page, column)
}

/** A number as a cell shows it, true minus sign included. */
export const numberOf = (text: string) => Number(text.replace('−', '-'))
