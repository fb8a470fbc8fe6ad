import { fileURLToPath } from 'node:url'
import type { Nitro } from 'nitropack/types'

/** Puts the API's error handler before Nuxt's, which goes on to answer for pages. */
export function registerErrorHandler(nitro: Nitro) {
  const { errorHandler } = nitro.options
  nitro.options.errorHandler = [fileURLToPath(new URL('./handler.ts', import.meta.url)), ...[errorHandler ?? []].flat()]
}
