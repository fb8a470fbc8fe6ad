import { execFile } from 'node:child_process'
import process from 'node:process'
import { fileURLToPath } from 'node:url'
import { evaluate } from '../../shared/modulation/index'
import { randomPoints } from './core'
import type { Measure, Row } from './measure'

/* Memory of one evaluation of the largest order, in a process of its own: this file is that process's program as well. */

const once = 'evaluate-once'
const order = 4096

/** Evaluates once; prints by how many MB the process's memory has grown at its peak. */
function evaluateOnce(): void {
  const points = randomPoints(order)
  const before = process.resourceUsage().maxRSS
  const labels = points.map((_, i) => i.toString(2).padStart(12, '0'))
  const esN0Db = Array.from({ length: 41 }, (_, n) => 20 + n)
  evaluate({
    constellation: { family: 'custom', points, labels }, esN0Db, target: { quantity: 'ser', value: 1e-6 },
    quantities: ['serUnion', 'serAllPairs', 'serNearest', 'serExact', 'mutualInformation'],
  })
  process.stdout.write(String((process.resourceUsage().maxRSS - before) / 1024))
}

async function run(): Promise<Row[]> {
  const grown = await new Promise<number>((resolve, reject) => {
    execFile(process.execPath, [fileURLToPath(import.meta.url), once], (error, stdout) => error ? reject(error) : resolve(Number(stdout)))
  })
  return [{ what: `memory of one evaluation of ${order} points at random, SER and mutual information at 41 values`, figure: grown, unit: 'MB', target: 256 }]
}

if (process.argv[2] === once) evaluateOnce()

export default { title: 'memory of one evaluation', needs: 'core', run } satisfies Measure
