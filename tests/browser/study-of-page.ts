import type { Page } from 'playwright-core'
import type { Candidate, CandidateChange } from '#shared/schemas/candidates'
import type { Study } from '#shared/schemas/studies'
import type { Client } from '../support/client'

/** A study that a test has made through the API, with its rows as the server answered them. */
export interface OwnStudy {
  id: string
  rows: Candidate[]
}

/** Creates a study with rows. */
export async function studyWith(client: Client, name: string, items: CandidateChange[]): Promise<OwnStudy> {
  const { status, body: study } = await client.post<Study>('/api/studies', { name })
  if (status !== 201) throw new Error(`The study was not created: ${status} ${JSON.stringify(study)}`)
  if (items.length === 0) return { id: study.id, rows: [] }
  const made = await client.post<{ items: Candidate[] }>(`/api/studies/${study.id}/candidates`, { items })
  if (made.status !== 201) throw new Error(`The rows were not created: ${made.status} ${JSON.stringify(made.body)}`)
  return { id: study.id, rows: made.body.items }
}

/** A row as the server has it now. */
export const rowNow = async (client: Client, id: string) => (await client.get<Candidate>(`/api/candidates/${id}`)).body

/** Changes a row as somebody else does meanwhile. */
export async function changeMeanwhile(client: Client, id: string, change: CandidateChange): Promise<void> {
  const { version } = await rowNow(client, id)
  const { status, body } = await client.patch(`/api/candidates/${id}`, change, { 'if-match': `"${version}"` })
  if (status !== 200) throw new Error(`The row was not changed: ${status} ${JSON.stringify(body)}`)
}

/** Names of a study's rows in their order, as the server has them. */
export async function namesOf(client: Client, study: string): Promise<string[]> {
  const { body } = await client.get<{ items: Candidate[] }>(`/api/studies/${study}/candidates?limit=2000`)
  return body.items.map(({ inputs }) => inputs.name)
}

/** The cell of a row and column. */
export const cellAt = (page: Page, row: string, column: string) => page.locator(`.ag-row[row-id="${row}"] [col-id="${column}"]`)

/** Opens the Candidates page of a study and waits until every row has its numbers or the reason why not. */
export async function openCandidates(page: Page, { id, rows }: OwnStudy): Promise<void> {
  await page.goto(`/studies/${id}/candidates`)
  for (const row of rows) await cellAt(page, row.id, 'requiredEsN0').filter({ hasNotText: 'computing' }).waitFor()
}

/** Opens a page and waits until it can be used: what is clicked before that is lost. */
export async function openReady(page: Page, path: string): Promise<void> {
  await page.goto(path)
  await page.waitForFunction(() => (window as { useNuxtApp?: () => { isHydrating?: boolean } }).useNuxtApp?.().isHydrating === false)
}

/** Complaints other than those that the browser itself makes about answers of these statuses, which the test has asked for. */
export const unexpected = (complaints: string[], ...statuses: (number | string)[]) =>
  complaints.filter(line => !statuses.some(status => line.includes('Failed to load resource') && line.includes(String(status))))
