import { spawn } from 'node:child_process'
import process from 'node:process'
import { Refusal, codeOf, say } from './say.mjs'

/**
 * A child process tied to this one.
 * @typedef {object} Child
 * @property {number} pid
 * @property {import('node:child_process').ChildProcess} process
 * @property {Promise<string>} ended resolves when it has ended, with how ("exit code 1", "signal SIGKILL")
 * @property {boolean} alive
 * @property {(graceMs: number, signal?: NodeJS.Signals) => Promise<void>} stop asks it to end, and kills it when it has not after the grace
 */

/**
 * Starts a child that gets SIGTERM from the kernel when this process ends, however it ends. It has a session of its own, so that Ctrl-C
 * in a terminal reaches only us, and we stop things in order.
 * @param {string} file program
 * @param {string[]} args
 * @param {import('node:child_process').SpawnOptions} [options]
 * @returns {Child}
 */
export function spawnTied(file, args, options = {}) {
  const child = spawn('setpriv', ['--pdeathsig', 'TERM', '--', file, ...args], { stdio: ['ignore', 'inherit', 'inherit'], ...options, detached: true })
  const pid = child.pid ?? 0
  /** @type {Child} */
  const tied = {
    pid,
    process: child,
    alive: true,
    ended: new Promise((resolve) => {
      const end = (/** @type {string} */ how) => {
        tied.alive = false
        resolve(how)
      }
      child.once('error', thrown => end(thrown.message))
      child.once('exit', (code, signal) => end(signal ? `signal ${signal}` : `exit code ${code}`))
    }),
    async stop(graceMs, signal = 'SIGTERM') {
      if (!tied.alive) return
      signalGroup(pid, signal)
      const killer = setTimeout(() => signalGroup(pid, 'SIGKILL'), graceMs)
      await tied.ended
      clearTimeout(killer)
    },
  }
  return tied
}

/**
 * Runs a program to its end with its output kept back; says every ten seconds that it still runs, and shows the output when it fails.
 * @param {import('./lifetime.mjs').Lifetime | undefined} lifetime stops the program when the command ends
 * @param {string} what what it does, for a reader: "building the application"
 * @param {string} file program
 * @param {string[]} args
 * @param {import('node:child_process').SpawnOptions} [options]
 * @returns {Promise<void>}
 * @throws {Refusal} when it fails
 */
export async function run(lifetime, what, file, args, options = {}) {
  const began = performance.now()
  const seconds = () => Math.round((performance.now() - began) / 1000)
  say(`${what[0]?.toUpperCase()}${what.slice(1)} …`)
  const child = spawnTied(file, args, { ...options, stdio: ['ignore', 'pipe', 'pipe'] })
  const forget = lifetime?.closing(() => child.stop(1500))
  let output = ''
  for (const stream of [child.process.stdout, child.process.stderr]) {
    stream?.setEncoding('utf8').on('data', (text) => {
      output = (output + text).slice(-20_000)
    })
  }
  const ticker = setInterval(() => say(`  still ${what}, ${seconds()} s`), 10_000)
  const how = await child.ended
  clearInterval(ticker)
  forget?.()
  if (how === 'exit code 0') {
    if (seconds() > 1) say(`  done after ${seconds()} s`)
    return
  }
  if (lifetime?.ending) throw new Refusal(`Stopped while ${what}.`)
  process.stderr.write(output.endsWith('\n') ? output : `${output}\n`)
  throw new Refusal(`Failed while ${what} (${how}): the program's own words are above.`)
}

/**
 * @param {number} pid leader of a process group that we made
 * @param {NodeJS.Signals} signal
 */
function signalGroup(pid, signal) {
  if (pid <= 0) return
  try {
    process.kill(-pid, signal)
  } catch (thrown) {
    if (codeOf(thrown) !== 'ESRCH') throw thrown
  }
}
