import process from 'node:process'
import { setTimeout as delay } from 'node:timers/promises'
import { localUrl } from './address.mjs'
import { spawnTied } from './children.mjs'
import { root } from './places.mjs'
import { Refusal, say } from './say.mjs'

/**
 * A running application server.
 * @typedef {object} Server
 * @property {number} pid
 * @property {string} url as a browser on this machine writes it, without a slash at its end
 * @property {Promise<string>} ended resolves when it has ended, with how
 * @property {(graceMs?: number) => Promise<void>} stop
 */

/**
 * Environment of the server, apart from the database.
 * @param {{ host: string, port: number, dataDir: string, sessionPassword: string, env: NodeJS.ProcessEnv }} given
 * @returns {NodeJS.ProcessEnv}
 */
export function serverEnv({ host, port, dataDir, sessionPassword, env }) {
  return {
    ...env,
    NODE_ENV: 'production',
    HOST: host,
    PORT: String(port),
    NITRO_HOST: host,
    NITRO_PORT: String(port),
    BASE_URL: env.BASE_URL || localUrl(host, port),
    NUXT_SESSION_PASSWORD: sessionPassword,
    HALFPLANE_DATA_DIR: dataDir,
  }
}

/**
 * Starts the built server and waits until it says that it is well.
 * @param {import('./lifetime.mjs').Lifetime | undefined} lifetime its end stops the server
 * @param {string} entry built server's entry
 * @param {NodeJS.ProcessEnv} env whole environment, from serverEnv
 * @param {number | 'inherit'} [output] where its words go
 * @returns {Promise<Server>}
 * @throws {Refusal} when it ends before that
 */
export async function startServer(lifetime, entry, env, output = 'inherit') {
  const url = localUrl(env.HOST ?? '', Number(env.PORT))
  const child = spawnTied(process.execPath, [entry], { cwd: root, env, stdio: ['ignore', output, output] })
  lifetime?.closing(() => child.stop(2100))
  say('Starting the server …')
  await untilHealthy(child, url)
  return { pid: child.pid, url, ended: child.ended, stop: (graceMs = 2100) => child.stop(graceMs) }
}

/**
 * @param {import('./children.mjs').Child} child
 * @param {string} url
 */
async function untilHealthy(child, url) {
  const began = performance.now()
  let told = began
  for (;;) {
    const answer = await health(url)
    if (answer === 'ok') return
    if (!child.alive) throw new Refusal(`The server ended before it was ready (${await child.ended}).`)
    if (performance.now() - told > 5000) {
      told = performance.now()
      say(`  not ready after ${Math.round((told - began) / 1000)} s: ${answer}`)
    }
    await delay(50)
  }
}

/**
 * @param {string} url
 * @returns {Promise<string>} ok, or what the server says is wrong
 */
async function health(url) {
  try {
    const response = await fetch(`${url}/api/health`, { signal: AbortSignal.timeout(5000) })
    const text = await response.text()
    return response.status === 200 ? 'ok' : text.slice(0, 300)
  } catch {
    return 'no answer yet'
  }
}
