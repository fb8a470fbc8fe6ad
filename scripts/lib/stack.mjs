import { closeSync, mkdirSync, openSync, existsSync, readFileSync, readdirSync, rmSync } from 'node:fs'
import { join } from 'node:path'
import process from 'node:process'
import { freePort } from './address.mjs'
import { ensureBuild } from './build.mjs'
import { takeDataFolder } from './data-folder.mjs'
import { startEmbedded } from './embedded.mjs'
import { withoutOurs } from './environment.mjs'
import { beginPart } from './lifetime.mjs'
import { waitUntilUnused } from './mariadb-files.mjs'
import { inRoot } from './places.mjs'
import { beginningOf } from './processes.mjs'
import { serverEnv, startServer } from './server.mjs'

/** Where tests and measurements build and keep their data, beside a running product. */
export const testFolder = inRoot('.test')
export const testBuild = join(testFolder, 'build')

/**
 * A database and a built server with the demonstration data, for tests and measurements.
 * @typedef {object} Stack
 * @property {string} baseUrl
 * @property {string} databaseUrl of the application's account
 * @property {string} databaseAdminUrl of the administrating account
 * @property {string} dataDir
 * @property {{ email: string, password: string, role: string }[]} accounts
 * @property {number} serverPid
 * @property {() => Promise<void>} close stops both and removes their data
 */

/**
 * Starts a stack on free loopback ports with a fresh folder .test/<kind>-<run>-<name>.
 * @param {'data' | 'bench'} kind
 * @param {string} name
 * @returns {Promise<Stack>}
 */
export async function startStack(kind, name) {
  await removeAbandoned()
  const env = withoutOurs(process.env)
  const part = beginPart()
  const dataDir = join(testFolder, `${kind}-${process.env.HALFPLANE_TEST_RUN ?? process.pid}-${name}`)
  const entry = await ensureBuild(part, { HALFPLANE_BUILD_DIR: testBuild })
  mkdirSync(testFolder, { recursive: true })
  try {
    part.closing(() => removeData(dataDir))
    part.closing(takeDataFolder(dataDir, `a test run's ${name}`))
    const parts = await startEmbedded(part, dataDir, {})
    const port = await freePort()
    const log = openSync(join(testFolder, `server-${name}.log`), 'w')
    const server = await startServer(part, entry, {
      ...serverEnv({ host: '127.0.0.1', port, dataDir, sessionPassword: parts.sessionPassword, env }),
      ...parts.env,
    }, log).finally(() => closeSync(log))
    const accounts = join(dataDir, 'demo-accounts.json')
    return {
      baseUrl: server.url,
      databaseUrl: parts.env.DATABASE_URL,
      databaseAdminUrl: parts.env.DATABASE_ADMIN_URL,
      dataDir,
      accounts: existsSync(accounts) ? JSON.parse(readFileSync(accounts, 'utf8')) : [],
      serverPid: server.pid,
      close: part.close,
    }
  } catch (thrown) {
    await part.close()
    throw thrown
  }
}

/**
 * Removes the folders that a test run has left, once nothing works on them.
 * @param {(run: number) => boolean} [of] which runs: by default those that have ended
 */
export async function removeAbandoned(of = run => beginningOf(run) === undefined) {
  if (!existsSync(testFolder)) return
  for (const name of readdirSync(testFolder)) {
    const run = /^(?:data|bench)-(\d+)-/.exec(name)?.[1]
    if (run && of(Number(run))) await removeData(join(testFolder, name))
  }
}

/** @param {string} dataDir */
async function removeData(dataDir) {
  await waitUntilUnused(join(dataDir, 'mariadb'))
  rmSync(dataDir, { recursive: true, force: true, maxRetries: 3 })
}
