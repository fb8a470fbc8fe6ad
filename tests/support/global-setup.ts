import type { TestProject } from 'vitest/node'
import { ensureChromium } from '../../scripts/lib/install.mjs'
import { startStack } from '../../scripts/lib/stack.mjs'

/** What a project with a server tells its tests; read it by Vitest's `inject`. */
declare module 'vitest' {
  interface ProvidedContext {
    /** address of the built server, without a slash at its end */
    baseUrl: string
    /** the application's account */
    databaseUrl: string
    /** the administrating account */
    databaseAdminUrl: string
    /** HALFPLANE_DATA_DIR of the server */
    dataDir: string
    /** accounts of the demonstration data */
    accounts: { email: string, password: string, role: string }[]
    /** process of the server */
    serverPid: number
    /** Chromium's program; empty where a project has no browser */
    chromium: string
  }
}

/** Starts a fresh MariaDB and the built server for one project; the answer stops both and removes their data. */
export default async function setup(project: TestProject): Promise<() => Promise<void>> {
  project.provide('chromium', project.name === 'browser' ? await ensureChromium(undefined) : '')
  const { close, ...stack } = await startStack('data', project.name)
  project.provide('baseUrl', stack.baseUrl)
  project.provide('databaseUrl', stack.databaseUrl)
  project.provide('databaseAdminUrl', stack.databaseAdminUrl)
  project.provide('dataDir', stack.dataDir)
  project.provide('accounts', stack.accounts)
  project.provide('serverPid', stack.serverPid)
  return close
}
