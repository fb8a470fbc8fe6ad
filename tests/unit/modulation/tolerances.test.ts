import { describe, expect, it } from 'vitest'
import { analyse, createConstellation, generate, largestGain, largestGainDb, largestRotationRad } from '../../../shared/modulation'
import type { FamilyId, FamilyParameters } from '../../../shared/modulation'
import { randomFrom } from './seeded'

const geometryOf = (id: FamilyId, parameters: FamilyParameters) => analyse(generate(id, parameters))
const degrees = (radians: number) => radians * 180 / Math.PI
const custom = (points: number[][]) => analyse(createConstellation(points))

describe('the largest rotation', () => {
  it('of QPSK is 45°', () => expect(degrees(largestRotationRad(geometryOf('psk', { order: 4 })))).toBeCloseTo(45, 12))
  it.each([2, 3, 8, 16, 256])('of %d-PSK is π/M', (order) => {
    expect(largestRotationRad(geometryOf('psk', { order }))).toBeCloseTo(Math.PI / order, 13)
  })
  // The corner (3, 3) at 45° meets y = 2 … x = 2 where √18·cos(45° + φ) = 2.
  it('of 16-QAM is 16.87°, acos(√2/3) − 45°', () => {
    expect(degrees(largestRotationRad(geometryOf('qam', { order: 16 })))).toBeCloseTo(16.874494, 6)
  })
  // (7, 7): √98·cos(45° + φ) = 6
  it('of 64-QAM is 7.70°, acos(3√2/7) − 45°', () => {
    expect(degrees(largestRotationRad(geometryOf('qam', { order: 64 })))).toBeCloseTo(degrees(Math.acos(3 * Math.SQRT2 / 7)) - 45, 12)
  })
  // The outer ring of radius 2 meets the bisector to the inner one: 2·cos φ = 3/2, before it has turned half a step.
  it('of two rings with their points on the same rays is acos(3/4)', () => {
    expect(largestRotationRad(geometryOf('apsk', { rings: [4, 4], ratios: [2], phases: [0, 0] }))).toBeCloseTo(Math.acos(3 / 4), 13)
  })
  it('leaves out a point at the origin', () => {
    // (1, 0) meets x = 1/2 at 60°.
    expect(degrees(largestRotationRad(custom([[0, 0], [1, 0]])))).toBeCloseTo(60, 12)
  })
  it('of points on a line turns them in the plane of their carrier: binary points stand 90°', () => {
    expect(degrees(largestRotationRad(custom([[-1], [1]])))).toBeCloseTo(90, 12)
  })
  it('of 4-PAM is acos(2/3)', () => expect(largestRotationRad(geometryOf('pam', { order: 4 }))).toBeCloseTo(Math.acos(2 / 3), 13))
  it('keeps every point in its cell up to there, and no farther', () => {
    const random = randomFrom(3)
    for (let n = 0; n < 100; n++) {
      const points = Array.from({ length: 2 + n % 9 }, () => [random() * 4 - 1, random() * 2 - 1])
      const angle = largestRotationRad(custom(points))
      expect(allAtHome(points, 1, angle * 0.999) && allAtHome(points, 1, -angle * 0.999)).toBe(true)
      expect(allAtHome(points, 1, angle * 1.001 + 1e-6) && allAtHome(points, 1, -angle * 1.001 - 1e-6)).toBe(false)
    }
  })
  it('is refused for points of three dimensions', () => {
    const solid = { ...custom([[0, 0], [1, 0]]), constellation: { ...custom([[0, 0], [1, 0]]).constellation, dimensions: 3 } }
    expect(() => largestRotationRad(solid)).toThrow('The largest rotation is offered for one and two dimensions.')
  })
})

describe('the largest gain error', () => {
  // The outer points at 3 meet the threshold at 2, the inner ones at 1 meet it from the other side.
  it('of 4-PAM is 2/3 to 2', () => {
    const { down, up } = largestGain(geometryOf('pam', { order: 4 }))
    expect([down, up].map(gain => gain.toFixed(12))).toEqual(['0.666666666667', '2.000000000000'])
  })
  it('of 16-QAM is 3.52 dB, 20·log10(3/2)', () => {
    expect(largestGainDb(geometryOf('qam', { order: 16 }))).toBeCloseTo(3.5218252, 7)
  })
  it('of 64-QAM is 1.34 dB, 20·log10(7/6)', () => {
    expect(largestGainDb(geometryOf('qam', { order: 64 }))).toBeCloseTo(20 * Math.log10(7 / 6), 12)
  })
  it.each([2, 4, 8, 64, 1024])('of %d-PSK has no limit', (order) => {
    expect(largestGain(geometryOf('psk', { order }))).toEqual({ down: 0, up: Infinity })
  })
  it('of PSK is infinite in dB', () => expect(largestGainDb(geometryOf('psk', { order: 8 }))).toBe(Infinity))
  it('of a point and one at the origin: down to the half', () => {
    expect(largestGain(custom([[0, 0], [2, 0]]))).toEqual({ down: 0.5, up: Infinity })
  })
  it('keeps every point in its cell up to there, and no farther', () => {
    const random = randomFrom(4)
    for (let n = 0; n < 100; n++) {
      const points = Array.from({ length: 2 + n % 9 }, () => [random() * 4 - 1, random() * 2 - 1])
      const { down, up } = largestGain(custom(points))
      expect(allAtHome(points, 1 + (down - 1) * 0.999, 0) && allAtHome(points, Math.min(1e9, 1 + (up - 1) * 0.999), 0)).toBe(true)
      if (up < Infinity) expect(allAtHome(points, 1 + (up - 1) * 1.001, 0)).toBe(false)
      if (down > 0) expect(allAtHome(points, 1 + (down - 1) * 1.001, 0)).toBe(false)
    }
  })
})

/** Whether every point is still nearest to where it was after a gain and a rotation. */
function allAtHome(points: number[][], gain: number, angle: number): boolean {
  const [c, s] = [gain * Math.cos(angle), gain * Math.sin(angle)]
  return points.every(([x, y], i) => {
    const away = points.map(([u, v]) => Math.hypot(c * x! - s * y! - u!, s * x! + c * y! - v!))
    return away[i]! <= Math.min(...away) * (1 + 1e-12)
  })
}
