import { mkdir, writeFile } from 'node:fs/promises'
import { join } from 'node:path'
import type { Nitro } from 'nitropack/types'

/**
 * Writes every route that the built server answers, those of packages included, beside the server,
 * so that a test can hold the list against the access rules.
 */
export function writeRouteList(nitro: Nitro) {
  nitro.hooks.hook('compiled', async () => {
    const routes = [...nitro.options.handlers, ...nitro.scannedHandlers]
      .filter(handler => !handler.middleware && handler.route)
      .map(handler => ({ method: handler.method?.toUpperCase() ?? 'ANY', route: handler.route }))
    await mkdir(nitro.options.output.serverDir, { recursive: true })
    await writeFile(join(nitro.options.output.serverDir, 'routes.json'), JSON.stringify(routes, null, 2))
  })
}
