import { createHash } from 'node:crypto'
import { tmpdir, userInfo } from 'node:os'
import { join, resolve } from 'node:path'
import process from 'node:process'

/** The project's own folder. */
export const root = resolve(import.meta.dirname, '../..')

/**
 * A path in the project.
 * @param {...string} parts
 * @returns {string} absolute
 */
export const inRoot = (...parts) => join(root, ...parts)

/**
 * Where the build goes: HALFPLANE_BUILD_DIR, as nuxt.config.ts reads it, or the default.
 * @param {NodeJS.ProcessEnv} env
 * @returns {{ buildDir: string | undefined, output: string }} absolute
 */
export function buildPlaces(env) {
  const buildDir = env.HALFPLANE_BUILD_DIR ? resolve(root, env.HALFPLANE_BUILD_DIR) : undefined
  return { buildDir, output: buildDir ? join(buildDir, 'output') : inRoot('.output') }
}

/**
 * Where the data goes: HALFPLANE_DATA_DIR, or .data in the project.
 * @param {NodeJS.ProcessEnv} env
 * @returns {string} absolute
 */
export const dataPlace = env => resolve(process.cwd(), env.HALFPLANE_DATA_DIR || inRoot('.data'))

/**
 * A lock for work on something in this clone. It lies outside, as the folders it protects are deleted and made anew.
 * @param {string} name what is protected
 * @returns {string}
 */
export function lockPlace(name) {
  const key = createHash('sha256').update(`${userInfo().uid}\n${root}\n${name}`).digest('hex').slice(0, 16)
  return join(tmpdir(), `halfplane-${key}.lock`)
}
