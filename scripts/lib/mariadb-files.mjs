import { existsSync, mkdirSync, readFileSync, readdirSync, renameSync, rmSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import process from 'node:process'
import { setTimeout as delay } from 'node:timers/promises'
import { run } from './children.mjs'
import { argumentsOf, beginningOf } from './processes.mjs'
import { Refusal, say } from './say.mjs'

/** A database account that takes part, for MariaDB's own options: it refuses to run as root unless told so. */
export const asRoot = process.getuid?.() === 0 ? ['--user=root'] : []

/** The application's account and its database. */
export const database = 'halfplane'

/**
 * Statements that give both accounts the passwords of the secrets file: run at every start, so that a lost file can be made anew.
 * @param {import('./data-folder.mjs').Secrets} secrets
 * @returns {string[]} one statement each
 */
export const passwordStatements = secrets => [
  `ALTER USER 'root'@'127.0.0.1' IDENTIFIED BY '${secrets.databaseRoot}'`,
  `CREATE USER IF NOT EXISTS '${database}'@'127.0.0.1'`,
  `ALTER USER '${database}'@'127.0.0.1' IDENTIFIED BY '${secrets.databaseUser}'`,
]

/**
 * Makes the database's own folder when there is none: under another name first, so that a kill in the middle leaves nothing that
 * looks whole.
 * @param {import('./lifetime.mjs').Lifetime | undefined} lifetime
 * @param {{ installer: string }} programs
 * @param {string} dataDir
 * @param {import('./data-folder.mjs').Secrets} secrets
 * @returns {Promise<string>} the database's folder
 */
export async function initialise(lifetime, programs, dataDir, secrets) {
  const folder = join(dataDir, 'mariadb')
  for (const name of readdirSync(dataDir).filter(name => name.startsWith('mariadb.new'))) {
    say(`Removing ${name}, which a killed start has left half made …`)
    rmSync(join(dataDir, name), { recursive: true, force: true })
  }
  if (existsSync(folder)) return folder

  const fresh = join(dataDir, `mariadb.new-${process.pid}`)
  const statements = join(fresh, 'accounts.sql')
  mkdirSync(fresh, { mode: 0o700 })
  writeSql(statements, [
    'FLUSH PRIVILEGES',
    `DELETE FROM mysql.global_priv WHERE User = 'root' AND Host <> '127.0.0.1'`,
    'FLUSH PRIVILEGES',
    ...passwordStatements(secrets),
    `CREATE DATABASE ${database} CHARACTER SET utf8mb4 COLLATE utf8mb4_unicode_ci`,
    // Given once only: the server may replace it by grants per table.
    `GRANT SELECT, INSERT, UPDATE, DELETE ON ${database}.* TO '${database}'@'127.0.0.1'`,
  ])
  await run(lifetime, `making a database in ${folder}`, programs.installer, [
    '--no-defaults', '--auth-root-authentication-method=normal', '--skip-test-db', '--skip-name-resolve',
    `--datadir=${fresh}`, `--extra-file=${statements}`, ...asRoot,
  ])
  rmSync(statements)
  renameSync(fresh, folder)
  return folder
}

/**
 * @param {string} path
 * @param {string[]} statements one line each, as MariaDB's init file wants
 */
export function writeSql(path, statements) {
  writeFileSync(path, statements.map(statement => `${statement};\n`).join(''), { mode: 0o600 })
}

/**
 * Waits until no database server works on a folder: the one of a killed start is still writing its last pages.
 * @param {string} folder the database's folder
 * @throws {Refusal} when one still does after 20 s
 */
export async function waitUntilUnused(folder) {
  const pid = serverOn(folder)
  if (!pid) return
  say(`Waiting for the database server of an earlier start (process ${pid}) to end …`)
  for (const limit = performance.now() + 20_000; performance.now() < limit; await delay(50)) {
    if (!serverOn(folder)) return
  }
  throw new Refusal(`A database server (process ${pid}) still works on ${folder}: end it, then start again.`)
}

/**
 * @param {string} folder
 * @returns {number | undefined} process of the database server that works on the folder
 */
function serverOn(folder) {
  const file = join(folder, 'mariadbd.pid')
  const pid = existsSync(file) ? Number(readFileSync(file, 'utf8')) : 0
  const ours = pid > 0 && beginningOf(pid) !== undefined && argumentsOf(pid).includes(`--datadir=${folder}`)
  return ours ? pid : undefined
}
