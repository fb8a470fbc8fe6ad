/** Migrates as told by its arguments (address, folder of migrations) and kills itself once the step of the third argument has been carried out. */
import { readFile } from 'node:fs/promises'
import { join } from 'node:path'
import { migrate } from '../../server/database/migrate'
import { readMigrations } from '../../server/database/migration-files'

const [, , url = '', folder = '', last = ''] = process.argv
const migrations = await readMigrations(path => readFile(join(folder, path), 'utf8'))
await migrate({
  adminUrl: url, url, migrations,
  afterStep: (_, step) => {
    if (step === Number(last)) process.kill(process.pid, 'SIGKILL')
  },
})
