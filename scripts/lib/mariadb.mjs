import { closeSync, openSync, readFileSync, rmSync } from 'node:fs'
import { createConnection } from 'node:net'
import { join } from 'node:path'
import { setTimeout as delay } from 'node:timers/promises'
import { freePort } from './address.mjs'
import { spawnTied } from './children.mjs'
import { ensureMariadb } from './install.mjs'
import { asRoot, database, initialise, passwordStatements, waitUntilUnused, writeSql } from './mariadb-files.mjs'
import { Refusal, say } from './say.mjs'

/**
 * A running embedded database.
 * @typedef {object} Mariadb
 * @property {number} pid
 * @property {string} url of the application's account
 * @property {string} adminUrl of the administrating account
 * @property {Promise<string>} ended resolves when it has ended, with how
 * @property {(graceMs?: number) => Promise<void>} stop
 */

// Modest in memory; UTC; strict. A row's upload may take tens of megabytes. The flush at a stop is short, as few pages stay dirty.
const settings = [
  '--bind-address=127.0.0.1', '--skip-name-resolve', '--default-time-zone=+00:00',
  '--sql-mode=STRICT_ALL_TABLES,ERROR_FOR_DIVISION_BY_ZERO,NO_ZERO_DATE,NO_ZERO_IN_DATE,NO_ENGINE_SUBSTITUTION',
  '--character-set-server=utf8mb4', '--collation-server=utf8mb4_unicode_ci',
  '--innodb-buffer-pool-size=128M', '--innodb-log-file-size=64M', '--innodb-max-dirty-pages-pct-lwm=5',
  '--key-buffer-size=1M', '--aria-pagecache-buffer-size=8M', '--max-connections=100', '--max-allowed-packet=64M',
]

/**
 * Starts a MariaDB of our own on a free loopback port, making its folder first where there is none.
 * @param {import('./lifetime.mjs').Lifetime | undefined} lifetime ends what is being made when the command ends
 * @param {string} dataDir absolute, existing, taken by this process alone
 * @param {import('./data-folder.mjs').Secrets} secrets
 * @returns {Promise<Mariadb>} when it answers
 * @throws {Refusal} when it does not start
 */
export async function startMariadb(lifetime, dataDir, secrets) {
  const programs = await ensureMariadb(lifetime)
  const folder = await initialise(lifetime, programs, dataDir, secrets)
  await waitUntilUnused(folder)
  say('Starting the database …')
  for (let attempt = 1; ; attempt++) {
    const mariadb = await launch(programs.server, folder, dataDir, secrets)
    if (typeof mariadb !== 'string') return mariadb
    // Somebody may have taken the port between our finding and its listening.
    if (attempt === 3 || !mariadb.includes('Address already in use')) {
      throw new Refusal(`${mariadb}\nThe database on ${folder} did not start: its own words are above.`)
    }
  }
}

/**
 * @param {string} program
 * @param {string} folder
 * @param {string} dataDir
 * @param {import('./data-folder.mjs').Secrets} secrets
 * @returns {Promise<Mariadb | string>} the end of its log when it did not start
 */
async function launch(program, folder, dataDir, secrets) {
  const port = await freePort()
  const log = join(dataDir, 'mariadb.log')
  const statements = join(dataDir, 'mariadb-passwords.sql')
  writeSql(statements, passwordStatements(secrets))
  const output = openSync(log, 'w', 0o600)
  const child = spawnTied(program, [
    // The socket's path is relative to the folder: one longer than 107 characters would be refused.
    '--no-defaults', `--datadir=${folder}`, '--socket=m.sock', `--pid-file=${join(folder, 'mariadbd.pid')}`,
    `--port=${port}`, `--init-file=${statements}`, ...settings, ...asRoot,
  ], { stdio: ['ignore', output, output] })
  closeSync(output)

  const slow = setTimeout(say, 3000, '  the database is still coming up (after a kill it first recovers its data) …')
  while (child.alive && !(await greets(port))) await delay(25)
  clearTimeout(slow)
  rmSync(statements, { force: true })
  if (!child.alive) return readFileSync(log, 'utf8').split('\n').slice(-20).join('\n')
  const at = `127.0.0.1:${port}/${database}`
  return {
    pid: child.pid,
    url: `mysql://${database}:${secrets.databaseUser}@${at}`,
    adminUrl: `mysql://root:${secrets.databaseRoot}@${at}`,
    ended: child.ended,
    stop: (graceMs = 10_000) => child.stop(graceMs),
  }
}

/**
 * Whether a database server greets on a port: it does once its init file is done.
 * @param {number} port
 * @returns {Promise<boolean>}
 */
function greets(port) {
  return new Promise((resolve) => {
    const socket = createConnection({ host: '127.0.0.1', port })
    // Four bytes of length and number, then the protocol's version, which is 10 since MySQL 3.21.
    socket.once('data', greeting => resolve(greeting[4] === 10))
    socket.once('error', () => resolve(false))
    socket.once('close', () => resolve(false))
    socket.setTimeout(1000, () => socket.destroy())
    socket.once('data', () => socket.destroy())
  })
}
