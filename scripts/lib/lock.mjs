import { linkSync, readFileSync, renameSync, rmSync, writeFileSync } from 'node:fs'
import process from 'node:process'
import { setTimeout as delay } from 'node:timers/promises'
import { beginningOf } from './processes.mjs'
import { codeOf, say } from './say.mjs'

/**
 * Who holds a lock.
 * @typedef {{ pid: number, beginning: string, note: string }} Holder
 */

/**
 * Takes a lock file, unless a living process holds it. A lock left by a killed process is taken over.
 * @param {string} path
 * @param {string} [note] for whoever finds it taken, such as the holder's address
 * @returns {{ release: () => void } | { holder: Holder }}
 */
export function takeLock(path, note = '') {
  const mine = `${path}.${process.pid}`
  const own = { pid: process.pid, beginning: beginningOf(process.pid) ?? '', note }
  writeFileSync(mine, JSON.stringify(own), { mode: 0o600 })
  try {
    for (;;) {
      try {
        // A link appears with its content, all at once, or fails when the name is there.
        linkSync(mine, path)
        return { release: () => rmSync(path, { force: true }) }
      } catch (thrown) {
        if (codeOf(thrown) !== 'EEXIST') throw thrown
      }
      const holder = holderOf(path)
      if (holder && beginningOf(holder.pid) === holder.beginning) return { holder }
      moveAside(path, `${mine}.stale`, holder)
    }
  } finally {
    rmSync(mine, { force: true })
  }
}

/**
 * Does something under a lock, after waiting for its holder to end or let go.
 * @template T
 * @param {string} path
 * @param {string} what what the other one does, for a reader: "installs packages"
 * @param {() => Promise<T>} body
 * @returns {Promise<T>}
 */
export async function underLock(path, what, body) {
  let said = false
  for (;;) {
    const lock = takeLock(path)
    if ('release' in lock) {
      try {
        return await body()
      } finally {
        lock.release()
      }
    }
    if (!said) say(`Waiting for process ${lock.holder.pid}, which ${what} …`)
    said = true
    await delay(200)
  }
}

/**
 * @param {string} path
 * @returns {Holder | undefined} undefined when the file is gone or unreadable
 */
export function holderOf(path) {
  try {
    const { pid, beginning, note } = JSON.parse(readFileSync(path, 'utf8'))
    return { pid: Number(pid), beginning: String(beginning), note: String(note) }
  } catch {
    return undefined
  }
}

/**
 * Removes a dead process's lock. Two that find the same one may both get here: the later one would remove the earlier one's fresh lock,
 * so look at what was moved, and put it back if it is not the dead one's.
 * @param {string} path
 * @param {string} aside
 * @param {Holder | undefined} dead
 */
function moveAside(path, aside, dead) {
  try {
    renameSync(path, aside)
    const moved = holderOf(aside)
    if (moved && (moved.pid !== dead?.pid || moved.beginning !== dead.beginning)) linkSync(aside, path)
  } catch (thrown) {
    if (!['ENOENT', 'EEXIST'].includes(codeOf(thrown))) throw thrown
  } finally {
    rmSync(aside, { force: true })
  }
}
