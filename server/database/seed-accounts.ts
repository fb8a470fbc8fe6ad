import { randomBytes } from 'node:crypto'
import { rename, writeFile } from 'node:fs/promises'
import { join } from 'node:path'
import type { Account } from '#shared/schemas/session'
import { seedDemonstration } from '../services/demonstration'
import { newId } from '../utils/ids'
import { useDatabase } from './client'
import { activity, users } from './schema'

/** Invented people of the demonstration. */
const people = {
  admin: { name: 'Ilse Brandvold', email: 'ilse.brandvold@example.org' },
  owner: { name: 'Tomás Echeverri', email: 'tomas.echeverri@example.org' },
  editor: { name: 'Maren Okafor', email: 'maren.okafor@example.org' },
  reviewer: { name: 'Henrik Sundqvist', email: 'henrik.sundqvist@example.org' },
  observer: { name: 'Noor Castellane', email: 'noor.castellane@example.org' },
} as const
type DemonstrationRole = keyof typeof people
const roles = Object.keys(people) as DemonstrationRole[]

/**
 * Loads the demonstration once, where HALFPLANE_DEMO=1 asks for it and there is nobody yet: five accounts with generated passwords, noted
 * in demo-accounts.json before they exist, and their studies.
 */
export async function seedAccounts(): Promise<void> {
  const folder = process.env.HALFPLANE_DATA_DIR
  if (process.env.HALFPLANE_DEMO !== '1' || !folder) return
  const db = useDatabase()
  if (await db.$count(users) === 0) await createAccounts(join(folder, 'demo-accounts.json'))
  // A start that was killed between the two goes on here; whoever has deleted the demonstration does not get it back.
  if (await db.$count(activity) > 0) return
  const accounts = await db.select().from(users)
  const accountOf = (role: DemonstrationRole): Account | undefined => accounts.find(account => account.email === people[role].email)
  const [owner, editor, reviewer, observer] = [accountOf('owner'), accountOf('editor'), accountOf('reviewer'), accountOf('observer')]
  if (owner && editor && reviewer && observer) await seedDemonstration(db, { owner, editor, reviewer, observer })
}

async function createAccounts(file: string) {
  const accounts = roles.map(role => ({ ...people[role], role, password: randomBytes(15).toString('base64url') }))
  const rows = await Promise.all(accounts.map(async ({ email, name, role, password }) => ({
    id: newId(), email, name, passwordHash: await hashPassword(password), role: role === 'admin' ? 'admin' as const : 'member' as const,
  })))
  const text = JSON.stringify(accounts.map(({ email, password, role }) => ({ email, password, role })), null, 2)
  await writeFile(`${file}.new`, `${text}\n`, { mode: 0o600 })
  await rename(`${file}.new`, file)
  await useDatabase().insert(users).values(rows)
}
