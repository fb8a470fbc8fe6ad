import { fromDecibels, q, serPhaseErrorFloor, serWithPhaseError } from '../../modulation'
import type { Check } from './check'
import { geometryOf, n0At, simpson } from './tools'

const radians = (degrees: number) => degrees * Math.PI / 180

const floor = (order: number, degrees: number): Check => ({
  method: 'phaseError', what: `${order}-PSK at ${degrees}° r.m.s.: floor 2·Q(π/(M·σ))`, source: 'commonPractice', within: { relative: 1e-7 },
  published: () => 2 * q(Math.PI / order / radians(degrees)), compute: () => serPhaseErrorFloor(geometryOf('psk', { order }), radians(degrees)),
})

/** Binary PSK: Q(√(2·Es/N0)·cos φ) averaged over a normal φ. */
const binary = (db: number, degrees: number): Check => ({
  method: 'phaseError', what: `binary PSK at ${db} dB and ${degrees}° r.m.s.: mean of Q(√(2·Es/N0)·cos φ)`, source: 'proakis', within: { relative: 1e-7 },
  published: () => simpson(x => Math.exp(-x * x / 2) / Math.sqrt(2 * Math.PI) * q(Math.sqrt(2 * fromDecibels(db)) * Math.cos(x * radians(degrees))), -12, 12, 4000),
  compute: () => serWithPhaseError(geometryOf('psk', { order: 2 }), n0At(db), radians(degrees)),
})

/** Carrier phase error. */
export const phaseErrorChecks: readonly Check[] = [floor(4, 10), floor(8, 6), binary(8, 10), binary(10, 20), binary(5, 45)]
