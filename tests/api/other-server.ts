import { closeSync, openSync, readFileSync } from 'node:fs'
import { join } from 'node:path'
import { inject } from 'vitest'
import { freePort } from '../../scripts/lib/address.mjs'
import { serverEnv, startServer } from '../../scripts/lib/server.mjs'
import { testFolder } from '../../scripts/lib/stack.mjs'
import { accountOf, Client } from '../support/client'

/** One more server on the tests' database, with the owner signed in at it. */
export async function otherServer(): Promise<{ client: Client, kill: () => Promise<void>, stop: () => Promise<void> }> {
  // The entry that the tests' own server was started with.
  const [, entry] = readFileSync(`/proc/${inject('serverPid')}/cmdline`, 'utf8').split('\0')
  const log = openSync(join(testFolder, 'server-other.log'), 'a')
  const env = serverEnv({
    host: '127.0.0.1', port: await freePort(), dataDir: inject('dataDir'), sessionPassword: 'a password for this server alone, of some length', env: process.env,
  })
  const server = await startServer(undefined, entry!, {
    ...env, DATABASE_URL: inject('databaseUrl'), DATABASE_ADMIN_URL: inject('databaseAdminUrl'),
  }, log).finally(() => closeSync(log))
  const client = new Client(server.url)
  const { email, password } = accountOf('owner')
  await client.post('/api/session', { email, password })
  return {
    client,
    kill: async () => {
      process.kill(server.pid, 'SIGKILL')
      await server.ended
    },
    stop: server.stop,
  }
}
