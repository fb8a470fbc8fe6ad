import { maximalOrder } from '../constellation-checks'
import type { Issue } from '../errors'
import { isWhole, orderIssues } from './family'
import type { Family, FamilyParameters, LatticeId } from './family'
import { latticeCut, latticeDimensions } from './lattice-cut'

const orders = 'A lattice cut has any whole number of points from 2 to 4096.'
const furthest = 100

/**
 * The M points of A2, D4 or E8 nearest to an offset, which becomes the origin; methods §12. Among points equally far away those of greater
 * coordinates come first, the first coordinate counting first. Nothing is recentred: an offset costs its energy.
 */
export const lattice: Family = {
  id: 'lattice',
  title: 'Lattice',
  orders,
  parameters: ['order', 'lattice', 'offset'],
  validate: ({ order, lattice, offset }) => [
    ...orderIssues(isWhole(order, 2, maximalOrder), orders),
    ...isLattice(lattice) ? offsetIssues(lattice, offset) : [{ path: ['lattice'], message: 'The lattice is A2, D4 or E8.' }],
  ],
  points: ({ order, lattice, offset }) => latticeCut(lattice!, order!, offset?.length ? offset : new Array<number>(latticeDimensions[lattice!]).fill(0)),
  signature: ({ order, lattice, offset }) => `${order}-${lattice}${offset?.some(x => x !== 0) ? ` about ${offset.join(', ')}` : ''}`,
}

const isLattice = (id: FamilyParameters['lattice']): id is LatticeId => typeof id === 'string' && Object.hasOwn(latticeDimensions, id)

function offsetIssues(lattice: LatticeId, offset: FamilyParameters['offset']): Issue[] {
  if (!offset || offset.length === 0) return []
  const dimensions = latticeDimensions[lattice]
  if (offset.length !== dimensions) return [{ path: ['offset'], message: `An offset of ${lattice} has ${dimensions} coordinates.` }]
  const wrong = offset.findIndex(x => !(Math.abs(x) <= furthest))
  return wrong < 0 ? [] : [{ path: ['offset', wrong], message: `A coordinate of the offset is from −${furthest} to ${furthest} minimum distances.` }]
}
