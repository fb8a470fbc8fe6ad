import { mkdtempSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { basename, extname, join } from 'node:path'
import { pathToFileURL } from 'node:url'
import type { Rollup } from 'vite'

const suffix = '?thread'
const prefix = '\0thread:'

/**
 * `import url from './worker?thread'` in the built server: the worker becomes a chunk of its own beside the entry, and `url()` its file URL.
 * Nitro sets every chunk's import.meta.url to the entry's, whatever folder the chunk lies in, and does so when the entry runs:
 * so the address is relative to the entry, and a function, not to be called at module level.
 * @returns a plugin for Nitro's Rollup
 */
export function threadForNitro(): Rollup.Plugin {
  return {
    name: 'halfplane:thread',
    resolveId: { order: 'pre', handler: resolveThread },
    load: {
      order: 'pre',
      handler(id) {
        if (!id.startsWith(prefix)) return null
        const worker = id.slice(prefix.length)
        const fileName = `${nameOf(worker)}.mjs`
        this.emitFile({ type: 'chunk', id: worker, fileName })
        return `export default () => new URL(${JSON.stringify(`./${fileName}`)}, import.meta.url).href`
      },
    },
  }
}

/**
 * The same import in Vitest: the worker is bundled into a temporary file, as a thread knows neither TypeScript nor our aliases.
 * @param alias the aliases of the tests, for the bundle
 * @returns a plugin for Vite
 */
export function threadForVitest(alias: Record<string, string>): Rollup.Plugin & { enforce: 'pre' } {
  return {
    name: 'halfplane:thread',
    enforce: 'pre',
    resolveId: resolveThread,
    async load(id) {
      if (!id.startsWith(prefix)) return null
      const worker = id.slice(prefix.length)
      // Loaded here: Nuxt's configuration imports this file too, and has no use for a second Vite.
      const { build } = await import('vite')
      const folder = mkdtempSync(join(tmpdir(), 'halfplane-thread-'))
      process.once('exit', () => rmSync(folder, { recursive: true, force: true }))
      const fileName = `${nameOf(worker)}.mjs`
      await build({
        configFile: false,
        logLevel: 'error',
        resolve: { alias },
        esbuild: { tsconfigRaw: '{}' },
        ssr: { noExternal: true },
        build: { ssr: worker, target: 'node20', outDir: folder, emptyOutDir: false, copyPublicDir: false, rollupOptions: { output: { entryFileNames: fileName } } },
      })
      return `export default () => ${JSON.stringify(pathToFileURL(join(folder, fileName)).href)}`
    },
  }
}

async function resolveThread(this: Rollup.PluginContext, source: string, importer: string | undefined): Promise<string | null> {
  if (!source.endsWith(suffix)) return null
  const worker = await this.resolve(source.slice(0, -suffix.length), importer, { skipSelf: true })
  if (!worker) throw new Error(`There is no worker ${source} beside ${importer}.`)
  return prefix + worker.id
}

const nameOf = (file: string) => basename(file, extname(file))
