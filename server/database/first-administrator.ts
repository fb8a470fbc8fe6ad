import { randomBytes } from 'node:crypto'
import { rename, writeFile } from 'node:fs/promises'
import { join } from 'node:path'
import { email as emailSchema } from '#shared/schemas/session'
import { newId } from '../utils/ids'
import { useDatabase } from './client'
import { users } from './schema'

/**
 * Makes one administrator of the address in HALFPLANE_ADMIN_EMAIL where there is nobody yet. The generated password is noted in
 * first-account.json of the data folder before the account exists, so that it cannot be lost.
 */
export async function seedFirstAdministrator(): Promise<void> {
  const { HALFPLANE_ADMIN_EMAIL: address, HALFPLANE_DATA_DIR: folder } = process.env
  if (!address || !folder) return
  const db = useDatabase()
  if (await db.$count(users) > 0) return
  const email = emailSchema.parse(address)
  const password = randomBytes(15).toString('base64url')
  const file = join(folder, 'first-account.json')
  await writeFile(`${file}.new`, `${JSON.stringify({ email, password, role: 'admin' }, null, 2)}\n`, { mode: 0o600 })
  await rename(`${file}.new`, file)
  await db.insert(users).values({ id: newId(), email, name: 'Administrator', passwordHash: await hashPassword(password), role: 'admin' })
  console.info(`The first administrator's password is in ${file}.`)
}
