import { spawn } from 'node:child_process'
import { readFileSync } from 'node:fs'
import { join } from 'node:path'
import { vi } from 'vitest'
import { withoutOurs } from '../../scripts/lib/environment.mjs'
import { root } from '../../scripts/lib/places.mjs'
import { beginningOf } from '../../scripts/lib/processes.mjs'
import { testBuild } from '../../scripts/lib/stack.mjs'

/** A running or ended `npm start`. */
export interface Start {
  /** process of npm itself */
  npm: number
  /** all that it has said so far */
  said: () => string
  /** resolves with npm's exit code, null when a signal ended it */
  ended: Promise<number | null>
}

/** Runs `npm start` on the tests' build, in a process group of its own as a terminal would. */
export function npmStart(dataDir: string, port: number): Start {
  const child = spawn('npm', ['start'], {
    cwd: root,
    detached: true,
    stdio: ['ignore', 'pipe', 'pipe'],
    env: { ...withoutOurs(process.env), HALFPLANE_BUILD_DIR: testBuild, HALFPLANE_DATA_DIR: dataDir, PORT: String(port) },
  })
  let text = ''
  child.stdout.setEncoding('utf8').on('data', (part: string) => (text += part))
  child.stderr.setEncoding('utf8').on('data', (part: string) => (text += part))
  return {
    npm: child.pid ?? 0,
    said: () => text,
    ended: new Promise(resolve => child.once('close', resolve)),
  }
}

/** Waits until a start says that it is ready; fails with what it said when it ends or takes longer than a minute. */
export async function untilReady(start: Start): Promise<void> {
  const ended = start.ended.then((code) => {
    throw new Error(`npm start ended with exit code ${code}:\n${start.said()}`)
  })
  const ready = vi.waitFor(() => {
    if (!start.said().includes('Halfplane is ready at')) throw new Error(`not ready:\n${start.said()}`)
  }, { timeout: 60_000, interval: 50 })
  await Promise.race([ready, ended])
}

/** What npm start has running on a data folder. */
export interface Family {
  /** scripts/start.mjs */
  script: number
  /** mariadbd */
  database: number
  /** the built server */
  server: number
}

/** The processes of a start that is ready. */
export function familyOn(dataDir: string): Family {
  const script = Number(JSON.parse(readFileSync(join(dataDir, 'running.lock'), 'utf8')).pid)
  const database = Number(readFileSync(join(dataDir, 'mariadb', 'mariadbd.pid'), 'utf8'))
  const children = readFileSync(`/proc/${script}/task/${script}/children`, 'utf8').trim().split(' ').map(Number)
  const server = children.find(pid => pid !== database) ?? 0
  return { script, database, server }
}

/** Those of some processes that still run. */
export const alive = (pids: number[]) => pids.filter(pid => beginningOf(pid) !== undefined)

/** Waits until none of some processes runs. */
export const untilGone = (pids: number[]) => vi.waitFor(() => {
  if (alive(pids).length > 0) throw new Error(`still running: ${alive(pids).join(', ')}`)
}, { timeout: 10_000, interval: 25 })
