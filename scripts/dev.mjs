/** npm run dev: the embedded database, and Nuxt's development server on it. */
import { existsSync } from 'node:fs'
import process from 'node:process'
import { localUrl, probePort, readAddress } from './lib/address.mjs'
import { spawnTied } from './lib/children.mjs'
import { takeDataFolder } from './lib/data-folder.mjs'
import { startEmbedded } from './lib/embedded.mjs'
import { ensurePackages } from './lib/install.mjs'
import { command } from './lib/lifetime.mjs'
import { dataPlace, inRoot, root } from './lib/places.mjs'
import { serverEnv } from './lib/server.mjs'

await command(async (lifetime) => {
  if (existsSync(inRoot('.env'))) process.loadEnvFile(inRoot('.env'))
  const { host, port } = readAddress(process.env)
  const dataDir = dataPlace(process.env)
  lifetime.closing(takeDataFolder(dataDir, localUrl(host, port)))
  await probePort(host, port)
  await ensurePackages(lifetime)
  const { sessionPassword, env } = await startEmbedded(lifetime, dataDir)

  const nuxt = spawnTied(inRoot('node_modules', '.bin', 'nuxt'), ['dev', '--host', host, '--port', String(port), ...process.argv.slice(2)], {
    cwd: root,
    env: { ...serverEnv({ host, port, dataDir, sessionPassword, env: process.env }), ...env, NODE_ENV: 'development', NUXT_TELEMETRY_DISABLED: '1' },
  })
  lifetime.closing(() => nuxt.stop(2100))
  lifetime.settled()
  void nuxt.ended.then(how => lifetime.end(1, `Nuxt ended by itself (${how}); stopping the database.`))
})
