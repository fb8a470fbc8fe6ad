import { inject } from 'vitest'

/** An answer of the API: JSON parsed, text as a string, anything else as bytes. */
export interface Answer<Body> {
  status: number
  headers: Headers
  body: Body
}

/** Headers of one call; If-Match carries a row's version. */
export type CallHeaders = Record<string, string>

/** A caller of the API with a cookie jar of its own; a change names the server's own origin, as a browser's page does. */
export class Client {
  private readonly cookies = new Map<string, string>()

  constructor(private readonly baseUrl: string, private readonly standing: CallHeaders = {}) {}

  get = <Body>(path: string, headers?: CallHeaders) => this.call<Body>('GET', path, undefined, headers)
  post = <Body>(path: string, body?: unknown, headers?: CallHeaders) => this.call<Body>('POST', path, body, headers)
  put = <Body>(path: string, body?: unknown, headers?: CallHeaders) => this.call<Body>('PUT', path, body, headers)
  patch = <Body>(path: string, body?: unknown, headers?: CallHeaders) => this.call<Body>('PATCH', path, body, headers)
  delete = <Body>(path: string, body?: unknown, headers?: CallHeaders) => this.call<Body>('DELETE', path, body, headers)

  /**
   * One call, as fetch makes it: for streams, and for requests that no page would send.
   * @param path below the server's address, with its query
   */
  async fetch(path: string, init: RequestInit = {}): Promise<Response> {
    const headers = new Headers({ ...this.standing })
    if (this.cookies.size > 0) headers.set('cookie', [...this.cookies].map(([name, value]) => `${name}=${value}`).join('; '))
    if (init.method && init.method !== 'GET') headers.set('origin', this.baseUrl)
    new Headers(init.headers).forEach((value, name) => headers.set(name, value))
    const response = await fetch(this.baseUrl + path, { redirect: 'manual', ...init, headers })
    response.headers.getSetCookie().forEach(line => this.keep(line))
    return response
  }

  private async call<Body>(method: string, path: string, body: unknown, headers: CallHeaders = {}): Promise<Answer<Body>> {
    const init = body === undefined
      ? { method, headers }
      : { method, headers: { 'content-type': 'application/json', ...headers }, body: JSON.stringify(body) }
    const response = await this.fetch(path, init)
    return { status: response.status, headers: response.headers, body: await read(response) as Body }
  }

  private keep(line: string) {
    const [pair = '', ...attributes] = line.split(';').map(part => part.trim())
    const name = pair.slice(0, pair.indexOf('='))
    const value = pair.slice(name.length + 1)
    const gone = value === '' || attributes.some(attribute => /^max-age=0$/i.test(attribute))
    if (gone) this.cookies.delete(name)
    else this.cookies.set(name, value)
  }
}

/** A caller whom the server does not know. */
export const anonymous = () => new Client(inject('baseUrl'))

/** A caller by API token. */
export const withToken = (token: string) => new Client(inject('baseUrl'), { authorization: `Bearer ${token}` })

/**
 * Signs in with an address and a password.
 * @throws Error when the server refuses
 */
export async function signInAs(email: string, password: string): Promise<Client> {
  const client = anonymous()
  const { status, body } = await client.post('/api/session', { email, password })
  if (status >= 300) throw new Error(`${email} could not sign in: ${status} ${JSON.stringify(body)}`)
  return client
}

/** The demonstration's account of a role: admin, owner, editor, reviewer or observer. */
export function accountOf(role: string) {
  const account = inject('accounts').find(account => account.role === role)
  if (!account) throw new Error(`The demonstration data have no account of role ${role}.`)
  return account
}

/** Signs in as the demonstration's account of a role. */
export async function signIn(role: string): Promise<Client> {
  const { email, password } = accountOf(role)
  return signInAs(email, password)
}

async function read(response: Response): Promise<unknown> {
  const type = response.headers.get('content-type') ?? ''
  if (type.includes('json')) {
    const text = await response.text()
    return text === '' ? undefined : JSON.parse(text)
  }
  if (type === '' || type.startsWith('text/')) return response.text()
  return new Uint8Array(await response.arrayBuffer())
}
