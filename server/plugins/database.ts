import { closeDatabase, databaseUrl } from '../database/client'
import { migrate } from '../database/migrate'
import { readMigrations } from '../database/migration-files'
import { watchDatabase } from '../database/ready'
import { seedFirstAdministrator } from '../database/first-administrator'
import { seedAccounts } from '../database/seed-accounts'
import { purgeStudies } from '../services/study-removal'
import { pruneSessions } from '../services/sessions'

/** How often a running server clears away what has expired, in milliseconds: every six hours. */
const upkeepEvery = 6 * 60 * 60 * 1000

/** Removes studies deleted long ago and expired sessions. */
async function upkeep() {
  await purgeStudies()
  await pruneSessions()
}

/** Waits for the database, brings its tables up to date, then watches over it; until then the API answers 503. */
export default defineNitroPlugin((nitro) => {
  const ended = new AbortController()
  const files = useStorage('assets:migrations')

  const prepare = async () => {
    const url = databaseUrl()
    const migrations = await readMigrations(async (path) => {
      const text = await files.getItemRaw<string | Uint8Array>(path.replaceAll('/', ':'))
      if (text === null) throw new Error(`The build lacks the migration file ${path}.`)
      return Buffer.from(text).toString('utf8')
    })
    const steps = await migrate({ adminUrl: process.env.DATABASE_ADMIN_URL || url, url, migrations })
    if (steps > 0) console.info(`The database's tables are up to date: ${steps} steps.`)
    await seedAccounts()
    await seedFirstAdministrator()
    await upkeep()
  }

  void watchDatabase(prepare, ended.signal)
  const timer = setInterval(() => upkeep().catch((error: unknown) => console.error('What has expired could not be cleared away.', error)), upkeepEvery)
  timer.unref()
  nitro.hooks.hook('close', async () => {
    ended.abort()
    clearInterval(timer)
    await closeDatabase()
  })
})
