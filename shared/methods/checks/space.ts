import { asymptoticEfficiencyDb, generate, minimumDistanceOf } from '../../modulation'
import type { FamilyId, FamilyParameters } from '../../modulation'
import type { Check } from './check'

type Lattice = NonNullable<FamilyParameters['lattice']>

/** Points of a lattice cut about one of its points whose squared distance from it is a multiple of the least one. */
function shell(lattice: Lattice, order: number, multiple: number): number {
  const constellation = generate('lattice', { lattice, order })
  const { points, dimensions } = constellation
  const wanted = multiple * minimumDistanceOf(constellation) ** 2
  let count = 0
  for (let i = 0; i < order; i++) {
    const energy = points.subarray(i * dimensions, (i + 1) * dimensions).reduce((sum, x) => sum + x * x, 0)
    if (Math.abs(energy - wanted) < 1e-6 * wanted) count++
  }
  return count
}

const kissing = (lattice: Lattice, order: number, published: string): Check => ({
  method: 'families', what: `kissing number of ${lattice}`, published, within: 0, source: 'conwaySloane', compute: () => shell(lattice, order, 1),
})
const second = (lattice: Lattice, order: number, multiple: number, published: string): Check => ({
  method: 'families', what: `points of ${lattice} at ${multiple} times the least squared norm`, published, within: 0, source: 'conwaySloane', place: 'theta series',
  compute: () => shell(lattice, order, multiple),
})
const efficiency = (id: FamilyId, order: number, name: string, published: string, source: Check['source']): Check => ({
  method: 'powerEfficiency', what: `${name} against antipodal points`, unit: 'dB', published, source, memory: true,
  compute: () => {
    const constellation = generate(id, { order })
    return asymptoticEfficiencyDb(constellation, minimumDistanceOf(constellation))
  },
})

/** Sets of more than two dimensions. */
export const spaceChecks: readonly Check[] = [
  kissing('A2', 40, '6'), kissing('D4', 60, '24'), kissing('E8', 300, '240'),
  second('A2', 40, 3, '6'), second('D4', 60, 2, '24'), second('E8', 2600, 2, '2160'),
  efficiency('biorthogonal', 8, '8 biorthogonal points in four dimensions', '1.76', 'agrellKarlsson'),
  efficiency('simplex', 4, '4 simplex points', '1.25', 'agrellKarlsson'),
  efficiency('orthogonal', 4, '4 orthogonal points, d² = 2Es', '0.00', 'proakis'),
  efficiency('orthogonal', 8, '8 orthogonal points', '1.76', 'proakis'),
  efficiency('hypercube', 16, '16 corners of a cube of four dimensions', '0.00', 'agrellKarlsson'),
]
