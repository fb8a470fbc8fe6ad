import { fileURLToPath } from 'node:url'
import { defineConfig } from 'vitest/config'
import type { TestProjectInlineConfiguration } from 'vitest/config'
import { threadForVitest } from './server/compute/thread-plugin'

const folder = (path: string) => fileURLToPath(new URL(path, import.meta.url))
const alias = { '#shared': folder('./shared'), '~~': folder('.'), '~': folder('./app') }

/** A project of its own for each thing that tests need; a later order waits for the earlier ones. */
function project(name: string, order: number, test: TestProjectInlineConfiguration['test'] = {}): TestProjectInlineConfiguration {
  return {
    resolve: { alias },
    // Given here, so that Nuxt's generated ones need not exist.
    esbuild: { tsconfigRaw: '{}' },
    plugins: [threadForVitest(alias)],
    test: { name, include: [`tests/${name}/**/*.test.ts`], environment: 'node', sequence: { groupOrder: order }, ...test },
  }
}

const withServer = { globalSetup: ['tests/support/global-setup.ts'], maxWorkers: 1, testTimeout: 60_000, hookTimeout: 120_000 }

export default defineConfig({
  test: {
    projects: [
      project('unit', 0, { maxWorkers: 2, testTimeout: 30_000 }),
      project('reference', 0, { maxWorkers: 2, testTimeout: 60_000 }),
      project('api', 1, withServer),
      // One more try: a browser beside other work on two cores now and then misses a moment that no condition names.
      project('browser', 2, { ...withServer, retry: 1 }),
    ],
  },
})
