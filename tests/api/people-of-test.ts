import type { Person } from '#shared/schemas/people'
import { signIn, signInAs } from '../support/client'
import type { Client } from '../support/client'

/** An account of a test's own, and how to sign in to it. */
export interface OwnPerson extends Person {
  password: string
  signIn: () => Promise<Client>
}

/** Creates an account as the administrator does. */
export async function ownPerson(name: string, role: 'admin' | 'member' = 'member'): Promise<OwnPerson> {
  const admin = await signIn('admin')
  const email = `${name.toLowerCase().replaceAll(' ', '.')}@example.org`
  const password = `a password of ${name}`
  const { status, body } = await admin.post<Person>('/api/people', { name, email, role, password })
  if (status !== 201) throw new Error(`The account was not created: ${status} ${JSON.stringify(body)}`)
  return { ...body, password, signIn: () => signInAs(email, password) }
}
