import { randomBytes } from 'node:crypto'
import { linkSync, mkdirSync, readFileSync, rmSync, statSync, writeFileSync } from 'node:fs'
import { dirname, join } from 'node:path'
import process from 'node:process'
import { takeLock } from './lock.mjs'
import { Refusal, codeOf } from './say.mjs'

/**
 * Generated passwords of the embedded parts.
 * @typedef {{ databaseRoot: string, databaseUser: string, session: string }} Secrets
 */

const reasons = /** @type {Record<string, string>} */ ({
  EACCES: 'this account may not write there',
  EPERM: 'this account may not write there',
  EROFS: 'the file system is read-only',
  ENOSPC: 'the disk is full',
  ENOENT: 'it cannot be made there',
  ENOTDIR: 'a part of its path is a file',
  EEXIST: 'there is a file of that name',
})

/**
 * Makes the data folder where there is none.
 * @param {string} folder absolute
 * @throws {Refusal} when it cannot be made
 */
export function makeDataFolder(folder) {
  writing(folder, () => makeFolder(folder))
}

/**
 * Node's own recursive form never ends where the system refuses with ENOENT, as /proc does.
 * @param {string} folder
 */
function makeFolder(folder) {
  if (statSync(folder, { throwIfNoEntry: false })?.isDirectory()) return
  if (dirname(folder) !== folder) makeFolder(dirname(folder))
  try {
    mkdirSync(folder, { mode: 0o700 })
  } catch (thrown) {
    // Another start may have been quicker.
    if (codeOf(thrown) !== 'EEXIST' || !statSync(folder).isDirectory()) throw thrown
  }
}

/**
 * Makes the data folder and takes it for this process alone.
 * @param {string} folder absolute
 * @param {string} note what a second start is told about us: our address
 * @returns {() => void} gives the folder back
 * @throws {Refusal} when it cannot be written, or another start has it
 */
export function takeDataFolder(folder, note) {
  makeDataFolder(folder)
  const lock = writing(folder, () => takeLock(join(folder, 'running.lock'), note))
  if ('release' in lock) return lock.release
  const { pid, note: address } = lock.holder
  throw new Refusal(`Halfplane already runs on the data folder ${folder} (process ${pid}, ${address}): stop that one, or set HALFPLANE_DATA_DIR and PORT to start another.`)
}

/**
 * The folder's secrets, generated on first use and kept with mode 0600.
 * @param {string} folder absolute, existing
 * @returns {Secrets}
 * @throws {Refusal} when the file is damaged or cannot be written
 */
export function keepSecrets(folder) {
  const path = join(folder, 'secrets.json')
  const fresh = `${path}.${process.pid}`
  const generated = Object.fromEntries(['databaseRoot', 'databaseUser', 'session'].map(name => [name, randomBytes(32).toString('base64url')]))
  return writing(folder, () => {
    try {
      writeFileSync(fresh, `${JSON.stringify(generated, null, 2)}\n`, { mode: 0o600, flush: true })
      linkSync(fresh, path)
    } catch (thrown) {
      if (codeOf(thrown) !== 'EEXIST') throw thrown
    } finally {
      rmSync(fresh, { force: true })
    }
    return readSecrets(path)
  })
}

/**
 * @param {string} path
 * @returns {Secrets}
 */
function readSecrets(path) {
  try {
    const { databaseRoot, databaseUser, session } = JSON.parse(readFileSync(path, 'utf8'))
    // They are put into SQL and URLs as they are: only what we generate ourselves is let in.
    if ([databaseRoot, databaseUser, session].every(secret => /^[\w-]{32,}$/.test(secret))) return { databaseRoot, databaseUser, session }
  } catch (thrown) {
    if (!(thrown instanceof SyntaxError)) throw thrown
  }
  throw new Refusal(`${path} is damaged: put back a copy, or delete it to have new secrets made (everybody then signs in again).`)
}

/**
 * @template T
 * @param {string} folder
 * @param {() => T} body
 * @returns {T}
 */
function writing(folder, body) {
  try {
    return body()
  } catch (thrown) {
    const code = codeOf(thrown)
    if (!code) throw thrown
    throw new Refusal(`Cannot write to the data folder ${folder}: ${reasons[code] ?? code}; set HALFPLANE_DATA_DIR to a folder that this account may write to.`)
  }
}
