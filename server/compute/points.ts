import { analyse, familyLabels, fromDecibels, generate, naturalLabels, shapedProbabilities, withProbabilities } from '#shared/modulation'
import type { Constellation, Geometry } from '#shared/modulation'
import { shapedBackOffDb } from '#shared/modulation/waveform'
import type { BackOff } from '#shared/modulation/waveform'
import type { CanonicalPoints } from '#shared/study/canonical-inputs'
import { Lru } from './lru'

/*
 * What depends on a row's points alone is kept in the worker, so that a change of the link budget, of a must-have or
 * of what is held constant costs next to nothing.
 */
const geometries = new Lru<Geometry>(200)
const labelled = new Lru<Geometry>(200)
const backOffs = new Lru<BackOff>(1000)

/** Tells points apart, whatever their normalisation, which changes nothing on an SNR axis. */
export const pointsKey = ({ family, parameters, labels, probabilities }: CanonicalPoints) =>
  JSON.stringify([family, parameters, labels, probabilities])

/** Points of a row with their probabilities, and with labels where they are not the family's. */
export function constellationOf({ family, parameters, labels, probabilities }: CanonicalPoints): Constellation {
  const points = generate(family, parameters, Array.isArray(labels) ? { labels } : {})
  const named = labels === 'natural' ? { ...points, labels: naturalLabels(points.order) } : points
  if (!probabilities) return named
  return withProbabilities(named, Array.isArray(probabilities) ? probabilities : shapedProbabilities(named, probabilities.entropy))
}

/** Geometry of a row's points before its normalisation. */
export function geometryOf(points: CanonicalPoints): Geometry {
  return geometries.get(pointsKey(points), () => analyse(constellationOf(points)))
}

/** The same with the family's labels where the row has none of its own; without labels where the family has none either. */
export function labelledGeometryOf(points: CanonicalPoints): Geometry {
  return labelled.get(pointsKey(points), () => {
    const geometry = geometryOf(points)
    const { constellation } = geometry
    return constellation.labels
      ? geometry
      : { ...geometry, constellation: { ...constellation, labels: familyLabels(points.family, points.parameters) } }
  })
}

/** Simulated back-off of a row's shaped waveform. */
export function backOffOf(points: CanonicalPoints, rollOff: number, exceedance: number): BackOff {
  return backOffs.get(`${pointsKey(points)} ${rollOff} ${exceedance}`, () =>
    shapedBackOffDb(geometryOf(points).constellation, { rollOff, exceedance }))
}

/** N0 in signal units squared at an Es/N0 in dB. */
export const noiseDensityAt = ({ meanEnergy }: Constellation, esN0Db: number) => meanEnergy / fromDecibels(esN0Db)
