import { execFile } from 'node:child_process'
import process from 'node:process'
import { analyse, createConstellation, generate, requiredEsN0Db, serExactCurve, serNearest, serUnionBound } from '../../shared/modulation/index'
import type { Constellation } from '../../shared/modulation/index'
import { expNegative } from '../../shared/modulation/exponential'
import { fromDecibels } from '../../shared/modulation/decibels'
import { mixedSweep, randomPoints } from './core'
import type { Measure, Row } from './measure'

/* The core beside the same work in NumPy and SciPy (reference.py), each in one thread. */

const esN0Db = Array.from({ length: 41 }, (_, n) => n)
const target = 1e-6
/** Debian's own Python first: python3-scipy belongs to it. */
const pythons = ['/usr/bin/python3', 'python3']

/** Rows of mixed families, and rows of points at random: unit mean energy. */
const sets: { what: string, limit: number, rows: () => Constellation[] }[] = [
  { what: '1,000-row sweep of built-in families, SER columns', limit: 1 / 5,
    rows: () => mixedSweep().map(({ family, ...parameters }) => generate(family as 'psk', parameters)) },
  { what: '60 sets of 64 to 256 points at random, SER columns', limit: 1,
    rows: () => Array.from({ length: 60 }, (_, n) => createConstellation(randomPoints([64, 128, 256][n % 3]! + n))) },
]

const pointsOf = ({ points, order, dimensions, meanEnergy }: Constellation) => Array.from({ length: order }, (_, i) =>
  Array.from(points.subarray(i * dimensions, (i + 1) * dimensions), x => x / Math.sqrt(meanEnergy)))

function own(rows: readonly Constellation[]): { seconds: number, required: number[][] } {
  const start = performance.now()
  const required = rows.map((constellation) => {
    const geometry = analyse(constellation)
    const n0s = esN0Db.map(db => constellation.meanEnergy / fromDecibels(db))
    for (const n0 of n0s) {
      serUnionBound(geometry, n0)
      serNearest(geometry, n0)
    }
    serExactCurve(geometry, n0s)
    return (['serUnion', 'serNearest', 'serExact'] as const).map(kind => requiredEsN0Db({ geometry, kind }, target))
  })
  return { seconds: (performance.now() - start) / 1000, required }
}

/** @returns null where no Python with NumPy and SciPy is found */
async function inNumpy(rows: readonly Constellation[]): Promise<{ seconds: number, required: number[][] } | null> {
  const asked = JSON.stringify({ rows: rows.map(pointsOf), esN0Db, target })
  const env = { ...process.env, OMP_NUM_THREADS: '1', OPENBLAS_NUM_THREADS: '1' }
  for (const python of pythons) {
    const answer = await new Promise<string | null>((resolve) => {
      const child = execFile(python, ['scripts/bench/reference.py'], { env, maxBuffer: 64 * 2 ** 20 }, (error, stdout) => resolve(error ? null : stdout))
      child.stdin?.on('error', () => resolve(null))
      child.stdin?.end(asked)
    })
    if (answer) return JSON.parse(answer)
  }
  return null
}

/** Exponentials a second, in millions, of the core's own exponential: what error integrals are bound by. */
function exponentials(): number {
  const count = 2e7
  const start = performance.now()
  let sum = 0
  for (let n = 0; n < count; n++) sum += expNegative(-(n % 4096) / 128)
  return sum > 0 ? count / (performance.now() - start) / 1000 : NaN
}

async function run(): Promise<Row[]> {
  const table: Row[] = [{ what: 'exponentials of the core, one thread', figure: exponentials(), unit: 'million/s', target: null }]
  for (const { what, limit, rows } of sets) {
    const constellations = rows()
    own(constellations.slice(0, 100))
    const ours = own(constellations)
    const theirs = await inNumpy(constellations)
    if (!theirs) {
      table.push({ what: `${what}: NumPy and SciPy are missing here, core alone`, figure: ours.seconds, unit: 's', target: null })
      continue
    }
    const apart = Math.max(...ours.required.flatMap((row, i) => row.map((db, n) => Math.abs(db - theirs.required[i]![n]!))))
    table.push(
      { what: `${what}: core ÷ NumPy and SciPy (${ours.seconds.toFixed(2)} s ÷ ${theirs.seconds.toFixed(2)} s)`, figure: ours.seconds / theirs.seconds, unit: '', target: limit },
      { what: 'the same, largest difference in required Es/N0', figure: apart, unit: 'dB', target: null },
    )
  }
  return table
}

export default { title: 'the core beside NumPy and SciPy', needs: 'core', run } satisfies Measure
