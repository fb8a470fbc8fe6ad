import {
  analyse, fromDecibels, generate, ModulationError, requiredEsN0Db, serAllPairs, serExact, serExactCurve, serNearest, serUnionBound,
} from '#shared/modulation'
import type { Geometry, SymbolErrorKind } from '#shared/modulation'
import { shapedBackOffDb } from '#shared/modulation/waveform'
import type { BackOff } from '#shared/modulation/waveform'
import type { CandidateCurves } from '#shared/schemas/values'
import { snrGrid } from '#shared/study/snr-grid'
import type { CanonicalInputs } from '#shared/study/canonical-inputs'
import { Lru } from './lru'

/*
 * What depends on a row's points alone is kept in the worker, so that a change of the link budget, of a must-have or
 * of what is held constant costs next to nothing.
 */
const geometries = new Lru<Geometry>(200)
const curves = new Lru<CandidateCurves>(200)
const backOffs = new Lru<BackOff>(1000)
const required = new Lru<RequiredSnr>(1000)

type Points = NonNullable<CanonicalInputs['constellation']>

/** Required Es/N0 in dB by each way to an error rate; null where that way misses the target everywhere or meets it everywhere. */
export interface RequiredSnr {
  serExact: number
  serUnion: number | null
  serAllPairs: number | null
  serNearest: number | null
}

const keyOf = ({ family, parameters }: Points) => JSON.stringify([family, parameters])

/** Geometry of a row's points before its normalisation, which changes nothing on an SNR axis. */
export function geometryOf(points: Points): Geometry {
  return geometries.get(keyOf(points), () => analyse(generate(points.family, points.parameters)))
}

/** Error-rate curves of a row over its SNR range. */
export function curvesOf(points: Points, range: CanonicalInputs['range']): CandidateCurves {
  return curves.get(`${keyOf(points)} ${JSON.stringify(range)}`, () => {
    const geometry = geometryOf(points)
    const esN0Db = snrGrid(range.start, range.stop, range.step)
    const n0s = esN0Db.map(db => noiseDensity(geometry, db))
    return {
      esN0Db,
      serUnion: n0s.map(n0 => serUnionBound(geometry, n0)),
      serNearest: n0s.map(n0 => serNearest(geometry, n0)),
      serExact: [...serExactCurve(geometry, n0s)],
    }
  })
}

/** SER of a row's points at one Es/N0 in dB, by each way. */
export function errorRatesAt(points: Points, esN0Db: number): Record<SymbolErrorKind, number> {
  const geometry = geometryOf(points)
  const n0 = noiseDensity(geometry, esN0Db)
  return {
    serUnion: serUnionBound(geometry, n0),
    serAllPairs: serAllPairs(geometry.constellation, n0),
    serNearest: serNearest(geometry, n0),
    serExact: serExact(geometry, n0),
  }
}

/**
 * Required Es/N0 of a row's points.
 * @throws ModulationError with path ['target'] when the exact curve cannot meet the target, or meets it everywhere
 */
export function requiredOf(points: Points, target: number): RequiredSnr {
  return required.get(`${keyOf(points)} ${target}`, () => {
    const geometry = geometryOf(points)
    return {
      serExact: requiredEsN0Db({ geometry, kind: 'serExact' }, target),
      serUnion: orNull(() => requiredEsN0Db({ geometry, kind: 'serUnion' }, target)),
      serAllPairs: orNull(() => requiredEsN0Db({ geometry, kind: 'serAllPairs' }, target)),
      serNearest: orNull(() => requiredEsN0Db({ geometry, kind: 'serNearest' }, target)),
    }
  })
}

/** Simulated back-off of a row's shaped waveform. */
export function backOffOf(points: Points, rollOff: number, exceedance: number): BackOff {
  return backOffs.get(`${keyOf(points)} ${rollOff} ${exceedance}`, () =>
    shapedBackOffDb(geometryOf(points).constellation, { rollOff, exceedance }))
}

function noiseDensity({ constellation }: Geometry, esN0Db: number): number {
  return constellation.meanEnergy / fromDecibels(esN0Db)
}

function orNull(find: () => number): number | null {
  try {
    return find()
  } catch (error) {
    if (error instanceof ModulationError) return null
    throw error
  }
}
