import type { Browser, Page } from 'playwright-core'
import { afterAll, beforeAll, beforeEach, describe, expect, inject, it } from 'vitest'
import { columns } from '#shared/columns'
import { ownPerson } from '../api/people-of-test'
import { launchBrowser, openPage } from '../support/browser'
import type { WatchedPage } from '../support/browser'
import { anonymous, signIn, withToken } from '../support/client'
import type { Client } from '../support/client'
import { openReady, studyWith, unexpected } from './study-of-page'

let browser: Browser
let page: Page
let complaints: string[]
let owner: Client

beforeAll(async () => {
  browser = await launchBrowser()
  owner = await signIn('owner')
})
afterAll(() => browser.close())

const signedIn = new Map<string, WatchedPage>()
/** A page signed in as a role; those who stay signed in share one browser context, for its cache. */
const openAs = async (role: string) => {
  const opened = signedIn.get(role) ?? await openPage(browser, role)
  signedIn.set(role, opened)
  page = opened.page
  complaints = opened.complaints
  complaints.length = 0
}
const openAlone = async (role?: string) => {
  const opened = await openPage(browser, role)
  page = opened.page
  complaints = opened.complaints
}

const notice = (text: string) => page.getByRole('status').filter({ hasText: text })

describe('studies', () => {
  let id: string
  let name: string
  let count = 0
  beforeEach(async () => {
    name = `Study of pages ${++count}`
    id = (await studyWith(owner, name, [{ name: 'only', family: 'psk', order: 4 }])).id
    await openAs('owner')
    await openReady(page, '/studies')
  })
  const row = (of = name) => page.getByRole('row').filter({ has: page.getByRole('link', { name: of, exact: true }) })
  const command = async (what: string) => {
    await row().getByRole('button', { name: `Commands for ${name}` }).click()
    await page.getByRole('menuitem', { name: what }).click()
  }
  const nameOnServer = async () => (await owner.get<{ name: string }>(`/api/studies/${id}`)).body.name

  it('a study is renamed', async () => {
    await command('Rename …')
    await page.getByRole('dialog').getByLabel('Name').fill(`${name} anew`)
    await page.getByRole('button', { name: 'Save the name' }).click()
    await row(`${name} anew`).waitFor()
    expect(await nameOnServer()).toBe(`${name} anew`)
    expect(complaints).toEqual([])
  })

  it('a name of nothing is refused beside its field', async () => {
    await command('Rename …')
    await page.getByRole('dialog').getByLabel('Name').fill('')
    await page.getByRole('button', { name: 'Save the name' }).click()
    const field = page.getByRole('dialog').getByLabel('Name')
    await expect.poll(() => field.getAttribute('aria-invalid')).toBe('true')
    expect(await nameOnServer()).toBe(name)
    expect(unexpected(complaints, 422)).toEqual([])
  })

  it('a duplicate opens with the same rows', async () => {
    await command('Duplicate …')
    await page.getByRole('button', { name: 'Make the copy' }).click()
    await page.getByRole('heading', { name: `${name} (copy)` }).waitFor()
    await page.locator('.ag-row [col-id="name"]').getByText('only', { exact: true }).waitFor()
    expect(complaints).toEqual([])
  })

  it('an archived study moves to its own list and comes back', async () => {
    await command('Archive')
    await row().waitFor({ state: 'detached' })
    await page.getByRole('link', { name: 'Archived' }).click()
    await row().waitFor()
    await command('Take back into work')
    await row().waitFor({ state: 'detached' })
    await page.getByRole('link', { name: 'In work' }).click()
    await row().waitFor()
    expect(complaints).toEqual([])
  })

  it('an archived study is not edited until it is taken back into work', async () => {
    await command('Archive')
    await row().waitFor({ state: 'detached' })
    await openReady(page, `/studies/${id}/candidates`)
    await page.getByText('This study is archived.').waitFor()
    const add = page.getByRole('button', { name: 'Add a row' })
    expect(await add.count()).toBe(0)
    await page.getByRole('button', { name: 'Take back into work' }).click()
    await add.waitFor()
    expect(await page.getByText('This study is archived.').count()).toBe(0)
    expect(complaints).toEqual([])
  })

  it('deleting asks first, and can be undone', async () => {
    await command('Delete …')
    await page.getByRole('button', { name: 'Keep it' }).click()
    await row().waitFor()
    await command('Delete …')
    await page.getByRole('button', { name: 'Delete the study' }).click()
    await notice(`“${name}” is deleted.`).waitFor()
    await row().waitFor({ state: 'detached' })
    await notice(`“${name}” is deleted.`).getByRole('button', { name: 'Undo' }).click()
    await row().waitFor()
    expect(await nameOnServer()).toBe(name)
    expect(complaints).toEqual([])
  })

  it('the history tells who renamed it, from what to what', async () => {
    await command('Rename …')
    await page.getByRole('dialog').getByLabel('Name').fill(`${name} told`)
    await page.getByRole('button', { name: 'Save the name' }).click()
    await row(`${name} told`).waitFor()
    await openReady(page, `/studies/${id}/history`)
    const entry = page.getByRole('row').filter({ hasText: `${name} told` }).first()
    expect(await entry.textContent()).toContain('Tomás Echeverri')
    expect(await entry.textContent()).toContain(`${name} → `)
    expect(complaints).toEqual([])
  })
})

describe('members', () => {
  it('an owner adds a person, gives another role and removes the person; undo brings the person back', async () => {
    const person = await ownPerson('Pia Members')
    const { id } = await studyWith(owner, 'Members under test', [])
    const roles = async () => (await owner.get<{ items: { name: string, role: string }[] }>(`/api/studies/${id}/members`)).body.items
      .filter(member => member.name === person.name).map(member => member.role)
    await openAs('owner')
    await openReady(page, `/studies/${id}/members`)
    await page.getByLabel('E-mail address of an account').fill(person.email)
    await page.getByRole('button', { name: 'Add', exact: true }).click()
    const role = page.getByLabel('Role of Pia Members')
    await role.waitFor()
    expect(await roles()).toEqual(['editor'])
    await role.selectOption({ label: 'Reviewer' })
    await notice('Pia Members is now reviewer.').waitFor()
    expect(await roles()).toEqual(['reviewer'])
    await page.getByRole('button', { name: 'Remove Pia Members' }).click()
    await page.getByRole('dialog').getByRole('button', { name: 'Remove' }).click()
    await role.waitFor({ state: 'detached' })
    expect(await roles()).toEqual([])
    await page.getByRole('button', { name: 'Undo' }).click()
    await role.waitFor()
    expect(await roles()).toEqual(['reviewer'])
    expect(complaints).toEqual([])
  })

  it('the last owner cannot step down: the list shows what is saved', async () => {
    const { id } = await studyWith(owner, 'One owner', [])
    await openAs('owner')
    await openReady(page, `/studies/${id}/members`)
    const role = page.getByLabel('Role of Tomás Echeverri')
    await role.selectOption({ label: 'Observer' })
    await page.getByRole('alert').waitFor()
    expect(await role.inputValue()).toBe('owner')
    expect(unexpected(complaints, 409, 422)).toEqual([])
  })
})

describe('account', () => {
  it('a new token is shown once, works, and no longer does once it is ended', async () => {
    await openAs('owner')
    await openReady(page, '/account')
    await page.getByLabel('Name of a new token').fill('of a test')
    await page.getByRole('button', { name: 'Make a token' }).click()
    const secret = (await page.locator('code.select-all').textContent())!
    expect((await withToken(secret).get('/api/studies')).status).toBe(200)
    await page.getByRole('button', { name: 'I have copied it' }).click()
    await page.getByRole('button', { name: 'End of a test' }).waitFor()
    await openReady(page, '/account')
    expect(await page.content()).not.toContain(secret)
    await page.getByRole('button', { name: 'End of a test' }).click()
    await notice('Token “of a test” no longer works.').waitFor()
    expect((await withToken(secret).get('/api/studies')).status).toBe(401)
    expect(complaints).toEqual([])
  })

  it('a name that is too long is kept as typed and told what is allowed', async () => {
    await openAs('owner')
    await openReady(page, '/account')
    const name = page.getByLabel('Name of a new token')
    await name.fill('n'.repeat(81))
    await page.getByRole('button', { name: 'Make a token' }).click()
    await page.getByText('A token\'s name has at most 80 characters.').waitFor()
    expect(await name.inputValue()).toBe('n'.repeat(81))
    expect(unexpected(complaints, 422)).toEqual([])
  })

  it('the sheet is chosen and kept', async () => {
    await openAs('owner')
    await openReady(page, '/account')
    await page.getByLabel('Colours of the sheet').selectOption({ label: 'Dark sheet' })
    const ground = () => page.evaluate(() => getComputedStyle(document.body).backgroundColor)
    await expect.poll(() => page.locator('html').getAttribute('data-sheet')).toBe('dark')
    const dark = await ground()
    await page.reload()
    expect([await page.locator('html').getAttribute('data-sheet'), await ground()]).toEqual(['dark', dark])
    expect(complaints).toEqual([])
  })
})

describe('administration', () => {
  it('an administrator makes an account, which can sign in, and shuts it out again', async () => {
    await openAs('admin')
    await openReady(page, '/administration')
    await page.getByLabel('Name', { exact: true }).fill('Ada Newcomer')
    await page.getByLabel('E-mail address', { exact: true }).fill('ada.newcomer@example.org')
    await page.getByLabel('First password').fill('first password of Ada')
    await page.getByRole('button', { name: 'Make the account' }).click()
    await notice('Ada Newcomer may sign in now.').waitFor()
    const enter = () => anonymous().post('/api/session', { email: 'ada.newcomer@example.org', password: 'first password of Ada' })
    expect((await enter()).status).toBe(200)
    await page.getByRole('button', { name: 'Shut out Ada Newcomer' }).click()
    await notice('Ada Newcomer is signed out everywhere').waitFor()
    expect((await enter()).status).toBe(401)
    expect(complaints).toEqual([])
  })

  it('is not there for a member', async () => {
    await openAs('owner')
    const answer = await page.goto('/administration')
    expect(answer?.status()).toBe(404)
    await page.getByText('There is nothing at this address').waitFor()
    expect(unexpected(complaints, 404)).toEqual([])
  })
})

describe('methods', () => {
  it('explains every column', async () => {
    await openAs('observer')
    await openReady(page, '/methods')
    expect(await page.locator('dt').count()).toBe(columns.length)
    expect(complaints).toEqual([])
  })
})

describe('the session', () => {
  it('without one every page leads to the sign-in, and from there back', async () => {
    await openAlone()
    await page.goto('/methods')
    expect(new URL(page.url()).pathname).toBe('/sign-in')
    const { email, password } = inject('accounts').find(({ role }) => role === 'observer')!
    await page.getByLabel('E-mail address').fill(email)
    await page.getByLabel('Password').fill(password)
    await page.getByRole('button', { name: 'Sign in' }).click()
    await page.waitForURL('**/methods')
    expect(complaints).toEqual([])
  })

  it('a wrong password says so without saying which half is wrong', async () => {
    await openAlone()
    await page.goto('/sign-in')
    await page.getByLabel('E-mail address').fill('nobody@example.org')
    await page.getByLabel('Password').fill('not the password')
    await page.getByRole('button', { name: 'Sign in' }).click()
    await page.getByRole('alert').waitFor()
    expect(await page.getByLabel('Password').inputValue()).toBe('')
    expect(unexpected(complaints, 401)).toEqual([])
  })

  it('signing out ends it at once', async () => {
    await openAlone('editor')
    await openReady(page, '/studies')
    await page.getByRole('button', { name: 'Maren Okafor' }).click()
    await page.getByRole('menuitem', { name: 'Sign out' }).click()
    await page.waitForURL('**/sign-in')
    await page.goto('/studies')
    expect(new URL(page.url()).pathname).toBe('/sign-in')
    expect(complaints).toEqual([])
  })

  it('one that was ended elsewhere leads to the sign-in at the next action', async () => {
    await openAlone('reviewer')
    await openReady(page, '/studies')
    const ended = await page.context().request.delete('/api/session', { headers: { origin: inject('baseUrl') } })
    expect(ended.ok()).toBe(true)
    await page.getByRole('link', { name: 'Archived' }).click()
    await page.waitForURL(url => url.pathname === '/sign-in')
    expect(unexpected(complaints, 401)).toEqual([])
  })
})
