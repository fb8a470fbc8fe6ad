import { closeSync, openSync, readFileSync } from 'node:fs'
import { join } from 'node:path'
import { inject } from 'vitest'
import { freePort } from '../../scripts/lib/address.mjs'
import { spawnTied } from '../../scripts/lib/children.mjs'
import { serverEnv } from '../../scripts/lib/server.mjs'
import { testFolder } from '../../scripts/lib/stack.mjs'

/** A built server of a test's own. */
export interface OwnServer {
  baseUrl: string
  pid: number
  /** resolves when it has ended, with how */
  ended: Promise<string>
  stop: () => Promise<void>
}

/**
 * Starts the built server that the tests' own was started from; it may not be ready yet, or ever.
 * @param name of its log
 * @param env what differs from the tests' own server
 */
export async function ownServer(name: string, env: Record<string, string>): Promise<OwnServer> {
  const [, entry = ''] = readFileSync(`/proc/${inject('serverPid')}/cmdline`, 'utf8').split('\0')
  const port = await freePort()
  const log = openSync(join(testFolder, `server-${name}.log`), 'w')
  const child = spawnTied(process.execPath, [entry], {
    stdio: ['ignore', log, log],
    env: {
      ...serverEnv({ host: '127.0.0.1', port, dataDir: inject('dataDir'), sessionPassword: 'a password for this server alone, of some length', env: process.env }),
      DATABASE_URL: inject('databaseUrl'), DATABASE_ADMIN_URL: inject('databaseAdminUrl'), ...env,
    },
  })
  closeSync(log)
  return { baseUrl: `http://127.0.0.1:${port}`, pid: child.pid, ended: child.ended, stop: () => child.stop(3000) }
}
