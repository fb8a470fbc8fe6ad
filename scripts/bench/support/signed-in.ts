import type { Context } from '../measure'

/** A caller who is signed in as the demonstration's owner. */
export async function signedIn({ baseUrl, accounts }: Context) {
  const { email, password } = accounts.find(account => account.role === 'owner')!
  const json = { 'content-type': 'application/json', 'origin': baseUrl }
  const answer = await fetch(`${baseUrl}/api/session`, { method: 'POST', headers: json, body: JSON.stringify({ email, password }) })
  if (!answer.ok) throw new Error(`The owner could not sign in: ${answer.status}`)
  const cookie = answer.headers.getSetCookie().map(line => line.split(';')[0]).join('; ')
  return async <T>(method: string, path: string, body?: unknown, headers: Record<string, string> = {}): Promise<T> => {
    const response = await fetch(baseUrl + path, {
      method, headers: { ...json, cookie, ...headers }, body: body === undefined ? undefined : JSON.stringify(body),
    })
    if (!response.ok) throw new Error(`${method} ${path}: ${response.status} ${await response.text()}`)
    return (/\/(events|export\.\w+)$/.test(path) ? response.body : await response.json()) as T
  }
}

/** One call of the API: its answer's JSON, for events and exports the stream itself. */
export type Call = Awaited<ReturnType<typeof signedIn>>

/** Creates a study. @returns its id */
export const newStudy = async (call: Call, name: string) => (await call<{ id: string }>('POST', '/api/studies', { name })).id
