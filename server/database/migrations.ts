import { useStorage } from 'nitropack/runtime'
import { statementsOf } from './migrate'
import type { Migration } from './migrate'

/** The generated migrations of drizzle/, in order, as they are bundled with the server. */
export async function bundledMigrations(): Promise<Migration[]> {
  const storage = useStorage('assets:migrations')
  const files = (await storage.getKeys()).filter(key => key.endsWith('.sql')).sort()
  return Promise.all(files.map(async key => ({
    tag: key.slice(0, -'.sql'.length),
    statements: statementsOf(await textOf(await storage.getItemRaw(key))),
  })))
}

const textOf = async (raw: unknown) => typeof raw === 'string' ? raw : Buffer.from(raw as Uint8Array).toString('utf8')
