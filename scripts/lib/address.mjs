import { createServer } from 'node:net'
import { Refusal, codeOf } from './say.mjs'

/**
 * The address to serve at, from HOST and PORT.
 * @param {NodeJS.ProcessEnv} env
 * @returns {{ host: string, port: number }}
 * @throws {Refusal} when PORT is no port number
 */
export function readAddress(env) {
  const host = env.HOST || '127.0.0.1'
  const text = env.PORT || '4310'
  const port = Number(text)
  if (!/^\d+$/.test(text) || port < 1 || port > 65535) throw new Refusal(`PORT is "${text}": it has to be a whole number from 1 to 65535.`)
  return { host, port }
}

/**
 * The address as a browser on this machine writes it: a server on all addresses is reached on the loopback one.
 * @param {string} host
 * @param {number} port
 * @returns {string} without a slash at its end
 */
export function localUrl(host, port) {
  const name = { '0.0.0.0': '127.0.0.1', '::': '[::1]' }[host] ?? (host.includes(':') ? `[${host}]` : host)
  return `http://${name}:${port}`
}

/**
 * Makes sure that the port can be listened on. Nitro itself ends with exit code 0 on a taken port.
 * @param {string} host
 * @param {number} port
 * @throws {Refusal} when it cannot
 */
export async function probePort(host, port) {
  try {
    await listenOnce(host, port)
  } catch (thrown) {
    const reasons = /** @type {Record<string, string>} */ ({
      EADDRINUSE: `Port ${port} on ${host} is taken by another program: stop that one, or choose another port, as in PORT=${port < 65535 ? port + 1 : 4310} npm start.`,
      EACCES: `Port ${port} on ${host} may not be used by this account: choose one above 1023, as in PORT=4310 npm start.`,
    })
    throw new Refusal(reasons[codeOf(thrown)] ?? `HOST is "${host}", which is no address of this machine (${codeOf(thrown)}).`)
  }
}

/**
 * A loopback port that is free now.
 * @returns {Promise<number>}
 */
export const freePort = () => listenOnce('127.0.0.1', 0)

/**
 * @param {string} host
 * @param {number} port
 * @returns {Promise<number>} the port that was listened on
 */
function listenOnce(host, port) {
  return new Promise((resolve, reject) => {
    const server = createServer()
    server.once('error', reject)
    server.listen({ host, port, exclusive: true }, () => {
      const address = server.address()
      server.close(() => resolve(address && typeof address === 'object' ? address.port : port))
    })
  })
}
