import { closeDatabase, databaseUrl } from '../database/client'
import { migrate } from '../database/migrate'
import { readMigrations } from '../database/migration-files'
import { watchDatabase } from '../database/ready'
import { seedAccounts } from '../database/seed-accounts'
import { purgeStudies } from '../services/study-removal'
import { pruneSessions } from '../services/sessions'

/** Waits for the database, brings its tables up to date, then watches over it; until then the API answers 503. */
export default defineNitroPlugin((nitro) => {
  const ended = new AbortController()
  const files = useStorage('assets:migrations')

  const prepare = async () => {
    const url = databaseUrl()
    const migrations = await readMigrations(async (path) => {
      const text = await files.getItemRaw<Uint8Array | string>(path.replaceAll('/', ':'))
      if (text === null) throw new Error(`The build lacks the migration file ${path}.`)
      return text.toString()
    })
    const steps = await migrate({ adminUrl: process.env.DATABASE_ADMIN_URL || url, url, migrations })
    if (steps > 0) console.info(`The database's tables are up to date: ${steps} steps.`)
    await seedAccounts()
    await purgeStudies()
    await pruneSessions()
  }

  void watchDatabase(prepare, ended.signal)
  nitro.hooks.hook('close', async () => {
    ended.abort()
    await closeDatabase()
  })
})
