import { afterEach, describe, expect, inject, it } from 'vitest'
import type { Account, CreatedToken } from '#shared/schemas/session'
import type { Problem } from '#shared/schemas/common'
import { accountOf, anonymous, signIn, withToken } from '../support/client'
import { databaseConnection } from './database-of-test'
import { ownPerson } from './people-of-test'

const database = databaseConnection()
const credentials = (role: string) => ({ email: accountOf(role).email, password: accountOf(role).password })

describe('signing in', () => {
  it('answers who it is', async () => {
    const { body } = await anonymous().post<Account>('/api/session', credentials('owner'))
    expect([body.email, body.role]).toEqual([accountOf('owner').email, 'member'])
  })
  it('takes the address in any case and with blanks around it', async () => {
    const { email, password } = credentials('owner')
    expect((await anonymous().post('/api/session', { email: ` ${email.toUpperCase()} `, password })).status).toBe(200)
  })
  it('sets a cookie for this site only that scripts cannot read, not Secure over http', async () => {
    const { headers } = await anonymous().post('/api/session', credentials('owner'))
    const [, ...attributes] = headers.getSetCookie()[0]!.split('; ')
    expect(attributes.filter(attribute => !attribute.startsWith('Expires='))).toEqual(['Path=/', 'HttpOnly', 'SameSite=Lax'])
  })
  it('makes a new session each time and ends the browser\'s one before', async () => {
    const client = anonymous()
    const cookieOf = (headers: Headers) => headers.getSetCookie()[0]!.split(';')[0]!
    const first = cookieOf((await client.post('/api/session', credentials('owner'))).headers)
    await client.post('/api/session', credentials('owner'))
    expect((await anonymous().get('/api/session', { cookie: first })).status).toBe(401)
  })
  it.each([
    ['a wrong password', () => ({ ...credentials('owner'), password: 'not the password' })],
    ['an unknown account', () => ({ email: 'unknown.person@example.org', password: 'not the password' })],
  ])('says of %s what it says of the other', async (_, body) => {
    const answer = await anonymous().post<Problem>('/api/session', body())
    expect([answer.status, answer.body.detail]).toEqual([401, 'The e-mail address or the password is wrong.'])
  })
  it('refuses a disabled account with the same sentence', async () => {
    const person = await ownPerson('Disabled Person')
    await (await signIn('admin')).patch(`/api/people/${person.id}`, { disabled: true })
    const { body } = await anonymous().post<Problem>('/api/session', { email: person.email, password: person.password })
    expect(body.detail).toBe('The e-mail address or the password is wrong.')
  })
  it('names each mistake by its path', async () => {
    const { status, body } = await anonymous().post<Problem>('/api/session', { email: 'nobody', password: 5, remember: true })
    expect([status, body.errors]).toEqual([422, [
      { path: 'email', message: 'Enter an e-mail address such as name@example.org.' },
      { path: 'password', message: 'Enter your password.' },
      { path: 'remember', message: 'This field does not exist.' },
    ]])
  })
})

describe('attempts to sign in', () => {
  afterEach(() => database().query('delete from sign_in_failures'))
  const attempt = (email: string, password = 'not the password') => anonymous().post('/api/session', { email, password })

  it('are refused after ten that failed for an account, even with the password, and say when to come back', async () => {
    const { email, password } = await ownPerson('Tried Person')
    for (let i = 0; i < 10; i++) expect((await attempt(email)).status).toBe(401)
    const { status, headers } = await attempt(email, password)
    const seconds = Number(headers.get('retry-after'))
    expect([status, seconds > 800 && seconds <= 900]).toEqual([429, true])
  })
  it('cannot be multiplied by making them at once', async () => {
    const { email } = await ownPerson('Hurried Person')
    const answers = await Promise.all(Array.from({ length: 25 }, () => attempt(email)))
    expect(answers.filter(({ status }) => status === 401).length).toBeLessThanOrEqual(10)
  })
  it('are counted anew after one that succeeded', async () => {
    const { email, password } = await ownPerson('Forgetful Person')
    for (let i = 0; i < 9; i++) await attempt(email)
    await attempt(email, password)
    expect((await attempt(email)).status).toBe(401)
    expect((await attempt(email, password)).status).toBe(200)
  })
  it('are refused after thirty that failed from an address, whatever the account', async () => {
    for (let i = 0; i < 30; i++) await attempt(`guess-${i}@example.org`)
    expect((await attempt('guess-30@example.org')).status).toBe(429)
  })
  it('are forgotten after fifteen minutes', async () => {
    const { email } = await ownPerson('Patient Person')
    for (let i = 0; i < 10; i++) await attempt(email)
    await database().query('update sign_in_failures set at = at - interval 16 minute')
    expect((await attempt(email)).status).toBe(401)
  })
})

describe('signing out', () => {
  it.each(['/api/session', '/api/_auth/session'])('by DELETE %s ends the session for whoever holds its cookie', async (path) => {
    const client = anonymous()
    const { headers } = await client.post('/api/session', credentials('observer'))
    const cookie = headers.getSetCookie()[0]!.split(';')[0]!
    await client.delete(path)
    expect((await anonymous().get('/api/session', { cookie })).status).toBe(401)
  })
  it('leaves nothing of the account in what pages read', async () => {
    const client = anonymous()
    const { headers } = await client.post('/api/session', credentials('observer'))
    const cookie = headers.getSetCookie()[0]!.split(';')[0]!
    await client.delete('/api/session')
    expect((await anonymous().get<{ user?: Account }>('/api/_auth/session', { cookie })).body.user).toBeUndefined()
  })
})

describe('what pages read of a session', () => {
  it('is who is signed in, without the session\'s own id', async () => {
    const { body } = await (await signIn('observer')).get<Record<string, unknown>>('/api/_auth/session')
    expect([Object.keys(body).sort(), (body.user as Account).email]).toEqual([['id', 'user'], accountOf('observer').email])
  })
})

describe('an account that is disabled', () => {
  it('loses its sessions at once', async () => {
    const person = await ownPerson('Dismissed Person')
    const client = await person.signIn()
    await (await signIn('admin')).patch(`/api/people/${person.id}`, { disabled: true })
    expect((await client.get('/api/session')).status).toBe(401)
  })
  it('can sign in again once it is enabled, its old sessions stay ended', async () => {
    const person = await ownPerson('Returning Person')
    const client = await person.signIn()
    const admin = await signIn('admin')
    await admin.patch(`/api/people/${person.id}`, { disabled: true })
    await admin.patch(`/api/people/${person.id}`, { disabled: false })
    expect([(await client.get('/api/session')).status, (await (await person.signIn()).get('/api/session')).status]).toEqual([401, 200])
  })
})

describe('a changed password', () => {
  it('ends the account\'s other sessions and keeps this one', async () => {
    const person = await ownPerson('Careful Person')
    const [here, elsewhere] = [await person.signIn(), await person.signIn()]
    await here.post('/api/account/password', { current: person.password, password: 'another long password' })
    expect([(await here.get('/api/session')).status, (await elsewhere.get('/api/session')).status]).toEqual([200, 401])
  })
  it('leaves API tokens working, and ends them all where that is asked for', async () => {
    const person = await ownPerson('Scripting Person')
    const client = await person.signIn()
    const secrets = await Promise.all(['one', 'two'].map(async name =>
      (await client.post<CreatedToken>('/api/account/tokens', { name, scope: 'read', days: 1 })).body.secret))
    const answers = () => Promise.all(secrets.map(async secret => (await withToken(secret).get('/api/session')).status))
    await client.post('/api/account/password', { current: person.password, password: 'another long password' })
    const before = await answers()
    await client.post('/api/account/password', { current: 'another long password', password: 'yet another long password', endTokens: true })
    expect([before, await answers()]).toEqual([[200, 200], [401, 401]])
  })
  it('needs the present one', async () => {
    const person = await ownPerson('Guessing Person')
    const { status, body } = await (await person.signIn()).post<Problem>('/api/account/password', { current: 'wrong', password: 'another long password' })
    expect([status, body.errors]).toEqual([422, [{ path: 'current', message: 'This is not your present password.' }]])
  })
  it('has at least twelve characters', async () => {
    const person = await ownPerson('Brief Person')
    const { body } = await (await person.signIn()).post<Problem>('/api/account/password', { current: person.password, password: 'short' })
    expect(body.errors).toEqual([{ path: 'password', message: 'A password has at least 12 characters.' }])
  })
})

describe('administrators', () => {
  it('are told that an address is taken', async () => {
    const { status, body } = await (await signIn('admin')).post<Problem>('/api/people', {
      email: accountOf('owner').email, name: 'Twice', role: 'member', password: 'a long enough password',
    })
    expect([status, body.errors]).toEqual([422, [{ path: 'email', message: 'There is an account with this address already.' }]])
  })
  it('cannot take the role from the last of them', async () => {
    const admin = await signIn('admin')
    const { body: self } = await admin.get<Account>('/api/session')
    const { status, body } = await admin.patch<Problem>(`/api/people/${self.id}`, { role: 'member' })
    expect([status, body.errors?.[0]?.path]).toEqual([422, 'role'])
  })
})

describe('changes that another site\'s page asks for', () => {
  it('are refused by their origin', async () => {
    const { status, body } = await (await signIn('owner')).post<Problem>('/api/studies', { name: 'x' }, { origin: 'https://elsewhere.example' })
    expect([status, body.detail]).toEqual([403, 'This request comes from another site\'s page.'])
  })
  it('are refused from a page without an origin', async () => {
    expect((await (await signIn('owner')).post('/api/studies', { name: 'x' }, { origin: 'null' })).status).toBe(403)
  })
  it('are refused by what the browser says when it names no origin', async () => {
    const response = await fetch(`${inject('baseUrl')}/api/session`, { method: 'DELETE', headers: { 'sec-fetch-site': 'cross-site' } })
    expect(response.status).toBe(403)
  })
  it('are no concern of a program that names neither', async () => {
    const response = await fetch(`${inject('baseUrl')}/api/session`, { method: 'POST', body: JSON.stringify(credentials('owner')), headers: { 'content-type': 'application/json' } })
    expect(response.status).toBe(200)
  })
})

describe('headers', () => {
  it('of the API keep answers out of caches and frames', async () => {
    const { headers } = await anonymous().get('/api/health')
    expect([headers.get('cache-control'), headers.get('content-security-policy'), headers.get('x-content-type-options')])
      .toEqual(['no-store', 'default-src \'none\'; frame-ancestors \'none\'', 'nosniff'])
  })
  it('of a page name a nonce that each of its script tags has, new each time', async () => {
    const page = async () => {
      const { headers, body } = await anonymous().get<string>('/sign-in')
      const [, nonce = ''] = /script-src 'self' 'nonce-([^']+)'/.exec(headers.get('content-security-policy') ?? '') ?? []
      const tags = body.match(/<(?:script|style)[\s>][^>]*/g) ?? []
      return { nonce, all: tags.length > 0 && tags.every(tag => tag.includes(`nonce="${nonce}"`)) }
    }
    const [first, second] = [await page(), await page()]
    expect([first.all, second.all, first.nonce === second.nonce]).toEqual([true, true, false])
  })
  it('ask for https only where the server is reached by it', async () => {
    expect((await anonymous().get('/api/health')).headers.get('strict-transport-security')).toBeNull()
  })
})
