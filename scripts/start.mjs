/** npm start: everything from an empty machine to the running product, and its end. */
import { existsSync } from 'node:fs'
import { join } from 'node:path'
import process from 'node:process'
import { localUrl, probePort, readAddress } from './lib/address.mjs'
import { ensureBuild } from './lib/build.mjs'
import { keepSecrets, makeDataFolder, takeDataFolder } from './lib/data-folder.mjs'
import { startEmbedded } from './lib/embedded.mjs'
import { ensureMariadb, ensurePackages } from './lib/install.mjs'
import { command } from './lib/lifetime.mjs'
import { dataPlace, inRoot } from './lib/places.mjs'
import { say } from './lib/say.mjs'
import { serverEnv, startServer } from './lib/server.mjs'

await command(async (lifetime) => {
  if (existsSync(inRoot('.env'))) process.loadEnvFile(inRoot('.env'))
  const env = process.env
  const { host, port } = readAddress(env)
  const dataDir = dataPlace(env)
  const embedded = !env.DATABASE_URL

  if (embedded) lifetime.closing(takeDataFolder(dataDir, localUrl(host, port)))
  await probePort(host, port)
  if (embedded) await ensureMariadb(lifetime)
  await ensurePackages(lifetime)
  const entry = await ensureBuild(lifetime, env)

  if (!embedded) makeDataFolder(dataDir)
  const parts = embedded ? await startEmbedded(lifetime, dataDir, env) : undefined
  const sessionPassword = parts?.sessionPassword ?? (env.NUXT_SESSION_PASSWORD || keepSecrets(dataDir).session)
  await probePort(host, port)
  const server = await startServer(lifetime, entry, { ...serverEnv({ host, port, dataDir, sessionPassword, env }), HALFPLANE_DEMO: undefined, ...parts?.env })

  lifetime.settled()
  const accounts = join(dataDir, 'demo-accounts.json')
  say(`Halfplane is ready at ${env.BASE_URL || server.url}`)
  if (parts && existsSync(accounts)) say(`Accounts of the demonstration: ${accounts}`)
  say('Ctrl-C stops it.')

  void server.ended.then(how => lifetime.end(1, `The server ended by itself (${how}); stopping the rest.`))
})
