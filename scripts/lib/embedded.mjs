import process from 'node:process'
import { keepSecrets } from './data-folder.mjs'
import { startMariadb } from './mariadb.mjs'

/**
 * The embedded parts in a data folder that this process has taken: secrets and database.
 * @typedef {object} Embedded
 * @property {string} sessionPassword
 * @property {{ DATABASE_URL: string, DATABASE_ADMIN_URL: string, HALFPLANE_DEMO: string }} env what the server has to know about the database
 */

/**
 * Starts the embedded parts; the lifetime's end stops them, and their end is the lifetime's.
 * @param {import('./lifetime.mjs').Lifetime} lifetime
 * @param {string} dataDir absolute, taken
 * @param {NodeJS.ProcessEnv} [env] may bring its own session password
 * @returns {Promise<Embedded>}
 */
export async function startEmbedded(lifetime, dataDir, env = process.env) {
  const secrets = keepSecrets(dataDir)
  const mariadb = await startMariadb(lifetime, dataDir, secrets)
  lifetime.closing(() => mariadb.stop(700))
  void mariadb.ended.then(how => lifetime.end(1, `The database ended by itself (${how}); stopping the rest.`))
  return {
    sessionPassword: env.NUXT_SESSION_PASSWORD || secrets.session,
    env: { DATABASE_URL: mariadb.url, DATABASE_ADMIN_URL: mariadb.adminUrl, HALFPLANE_DEMO: '1' },
  }
}
