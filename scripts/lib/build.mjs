import { existsSync, readFileSync, readdirSync, statSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import process from 'node:process'
import { run } from './children.mjs'
import { withoutOurs } from './environment.mjs'
import { underLock } from './lock.mjs'
import { buildPlaces, inRoot, lockPlace, root } from './places.mjs'

// What goes into the build: the folders with all they hold, and the files at the top that configure it.
const sourceFolders = ['app', 'server', 'shared', 'drizzle', 'public']
const sourceFiles = /^(package(-lock)?\.json|(nuxt|tailwind|postcss|app)\.config\.\w+|tsconfig\.json)$/

const nuxt = inRoot('node_modules', '.bin', 'nuxt')

/**
 * Builds the application when its sources are newer than the last whole build, or there is none.
 * @param {import('./lifetime.mjs').Lifetime | undefined} lifetime
 * @param {NodeJS.ProcessEnv} env HALFPLANE_BUILD_DIR chooses the place
 * @returns {Promise<string>} the built server's entry, absolute
 */
export async function ensureBuild(lifetime, env) {
  const { buildDir, output } = buildPlaces(env)
  const entry = join(output, 'server', 'index.mjs')
  const note = join(output, 'halfplane-build.json')
  const fresh = () => existsSync(entry) && newestSource() <= builtFrom(note)
  if (fresh()) return entry

  // One build at a time: each reads the types' configuration that another, into another place, may just be writing anew.
  await underLock(lockPlace('build'), 'builds the application', async () => {
    if (fresh()) return
    await ensureTypes(lifetime)
    const begun = Date.now()
    await run(lifetime, 'building the application (a minute or so)', nuxt, ['build'], {
      cwd: root,
      env: { ...quietly(), ...(buildDir ? { HALFPLANE_BUILD_DIR: buildDir } : {}), NODE_ENV: 'production' },
    })
    // What changes during a build is newer than it. Nitro empties the place first, so a broken build has no note.
    writeFileSync(note, JSON.stringify({ begun }))
  })
  return entry
}

/**
 * Writes Nuxt's types when they are missing: tsconfig.json refers to them at their usual place, wherever the build goes.
 * @param {import('./lifetime.mjs').Lifetime | undefined} lifetime
 */
async function ensureTypes(lifetime) {
  if (existsSync(inRoot('.nuxt', 'tsconfig.app.json'))) return
  await run(lifetime, 'writing the types of the framework', nuxt, ['prepare'], { cwd: root, env: quietly() })
}

/** @returns {NodeJS.ProcessEnv} of a program of the framework that neither asks nor reports */
function quietly() {
  return { ...withoutOurs(process.env), NUXT_TELEMETRY_DISABLED: '1', CI: '1' }
}

/**
 * @param {string} note
 * @returns {number} ms since 1970; before everything when there is no whole build
 */
function builtFrom(note) {
  return existsSync(note) ? Number(JSON.parse(readFileSync(note, 'utf8')).begun) : -Infinity
}

/** @returns {number} ms since 1970 of the newest file or folder (a deletion changes its folder) that goes into the build */
function newestSource() {
  const tops = readdirSync(root).filter(name => sourceFiles.test(name)).map(name => inRoot(name))
  const folders = sourceFolders.map(name => inRoot(name)).filter(existsSync)
  const inside = folders.flatMap(folder => readdirSync(folder, { recursive: true, encoding: 'utf8' }).map(name => join(folder, name)))
  return Math.max(...[...tops, ...folders, ...inside].map(path => statSync(path, { throwIfNoEntry: false })?.mtimeMs ?? 0))
}
