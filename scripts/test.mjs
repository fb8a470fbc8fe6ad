/** npm test: installs what is missing and runs Vitest; what its projects need beyond that they start themselves (tests/support). */
import { existsSync, mkdirSync, readFileSync, rmSync } from 'node:fs'
import { join } from 'node:path'
import process from 'node:process'
import { spawnTied } from './lib/children.mjs'
import { withoutOurs } from './lib/environment.mjs'
import { ensurePackages } from './lib/install.mjs'
import { command } from './lib/lifetime.mjs'
import { inRoot, root } from './lib/places.mjs'
import { say } from './lib/say.mjs'
import { removeAbandoned, testFolder } from './lib/stack.mjs'

await command(async (lifetime) => {
  await ensurePackages(lifetime)
  const run = process.pid
  const results = join(testFolder, `results-${run}.json`)
  mkdirSync(testFolder, { recursive: true })
  lifetime.closing(() => removeAbandoned(other => other === run))
  lifetime.closing(() => rmSync(results, { force: true }))

  const vitest = spawnTied(process.execPath, [
    inRoot('node_modules', 'vitest', 'vitest.mjs'), 'run', '--reporter=default', '--reporter=json', `--outputFile.json=${results}`,
    ...process.argv.slice(2),
  ], { cwd: root, env: { ...withoutOurs(process.env), HALFPLANE_TEST_RUN: String(run) } })
  lifetime.closing(() => vitest.stop(2000))
  const how = await vitest.ended
  if (lifetime.ending) return

  const { passed, failed } = count(results, how === 'exit code 0')
  say(`${passed} passed, ${failed} failed`)
  await lifetime.end(how === 'exit code 0' && failed === 0 ? 0 : 1)
})

/**
 * Counts tests. A file that could not be loaded, and a run that broke outside its tests, count as one failure each: nothing that went
 * wrong may read as "0 failed".
 * @param {string} results Vitest's JSON report
 * @param {boolean} well whether Vitest itself says so
 * @returns {{ passed: number, failed: number }}
 */
function count(results, well) {
  if (!existsSync(results)) return { passed: 0, failed: 1 }
  const report = JSON.parse(readFileSync(results, 'utf8'))
  /** @type {{ status: string, assertionResults: { status: string }[] }[]} */
  const files = report.testResults
  const broken = files.filter(file => file.status === 'failed' && !file.assertionResults.some(test => test.status === 'failed'))
  const failed = report.numFailedTests + broken.length
  return { passed: report.numPassedTests, failed: well || failed > 0 ? failed : 1 }
}
