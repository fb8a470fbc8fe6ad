import { accessSync, constants, existsSync, statSync } from 'node:fs'
import { delimiter, join } from 'node:path'
import process from 'node:process'
import { run } from './children.mjs'
import { underLock } from './lock.mjs'
import { inRoot, lockPlace, root } from './places.mjs'
import { Refusal } from './say.mjs'

/** @typedef {import('./lifetime.mjs').Lifetime} Lifetime */

const serverPackages = ['mariadb-server-core', 'mariadb-client']

/**
 * Installs the npm packages when they are missing or older than the lockfile. npm writes its own note last, so an interrupted
 * installation is done again.
 * @param {Lifetime | undefined} lifetime
 */
export async function ensurePackages(lifetime) {
  if (packagesFresh()) return
  await underLock(lockPlace('packages'), 'installs packages', async () => {
    if (packagesFresh()) return
    await run(lifetime, 'installing npm packages (a minute or two)', 'npm', ['ci', '--include=dev'], { cwd: root })
  })
}

/**
 * MariaDB's programs, installed from Debian when missing and we are root.
 * @param {Lifetime | undefined} lifetime
 * @returns {Promise<{ server: string, installer: string }>} absolute paths
 * @throws {Refusal} when missing and we are not root
 */
export async function ensureMariadb(lifetime) {
  const names = ['mariadbd', 'mariadb-install-db', 'my_print_defaults']
  const [server, installer] = await ensurePrograms(lifetime, 'MariaDB', names, serverPackages)
  return { server: server ?? '', installer: installer ?? '' }
}

/**
 * Debian's Chromium, for the tests in a browser.
 * @param {Lifetime | undefined} lifetime
 * @returns {Promise<string>} absolute path
 * @throws {Refusal} when missing and we are not root
 */
export async function ensureChromium(lifetime) {
  const [chromium] = await ensurePrograms(lifetime, 'Chromium', ['chromium'], ['chromium'])
  return chromium ?? ''
}

/**
 * @param {Lifetime | undefined} lifetime
 * @param {string} what
 * @param {string[]} names of programs
 * @param {string[]} packages of Debian that bring them
 * @returns {Promise<string[]>} absolute paths, in the order of the names
 */
async function ensurePrograms(lifetime, what, names, packages) {
  const missing = () => names.some(name => !findProgram(name))
  if (missing()) {
    const line = `apt-get install -y --no-install-recommends ${packages.join(' ')}`
    if (process.getuid?.() !== 0) throw new Refusal(`${what} is missing; run this once, then try again:  sudo ${line}`)
    if (!findProgram('apt-get')) throw new Refusal(`${what} is missing, and this system has no apt-get: install ${packages.join(' and ')} by its own means.`)
    await underLock(lockPlace('debian'), 'installs Debian packages', async () => {
      if (!missing()) return
      const env = { ...process.env, DEBIAN_FRONTEND: 'noninteractive' }
      await run(lifetime, 'asking Debian for its list of packages', 'apt-get', ['-q', 'update'], { env })
      await run(lifetime, `installing ${packages.join(' and ')} from Debian`, 'apt-get', ['-q', ...line.split(' ').slice(1)], { env })
    })
    if (missing()) throw new Refusal(`${what} is still missing after installing ${packages.join(' and ')}.`)
  }
  return names.map(name => findProgram(name) ?? name)
}

/**
 * @param {string} name
 * @returns {string | undefined} its absolute path; the places for administrators are looked at too, though they are not in everybody's PATH
 */
function findProgram(name) {
  const folders = [...(process.env.PATH ?? '').split(delimiter), '/usr/sbin', '/usr/bin', '/usr/local/sbin'].filter(Boolean)
  return folders.map(folder => join(folder, name)).find((path) => {
    try {
      accessSync(path, constants.X_OK)
      return true
    } catch {
      return false
    }
  })
}

/** @returns {boolean} */
function packagesFresh() {
  const installed = inRoot('node_modules', '.package-lock.json')
  return existsSync(installed) && statSync(installed).mtimeMs >= statSync(inRoot('package-lock.json')).mtimeMs
}
