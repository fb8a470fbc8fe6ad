import type { Constellation } from './constellation'
import { probabilityOf } from './constellation'
import { edgeFlow } from './edge-flow'
import { q } from './gaussian'
import { mapCells } from './power-diagram'
import type { MapCells } from './power-diagram'

/**
 * Exact mean symbol error rate of maximum a posteriori decisions, for one or two dimensions and any probabilities.
 * It never rises with the SNR, and never exceeds that of minimum-distance decisions.
 * @param constellation points with their probabilities
 * @param n0 noise density N0 above 0, signal units squared
 * @returns probability; relative error below 1e-9
 * @throws ModulationError with path ['dimensions'] for more than two dimensions, ['n0'] when N0 is not positive and finite
 * @see methods §2
 */
export function serMap(constellation: Constellation, n0: number): number {
  return serMapOf(mapCells(constellation, n0))
}

/** The same for cells that are there already. */
export function serMapOf(cells: MapCells): number {
  return weighted(cells.constellation, errorsOf(cells))
}

/**
 * Exact symbol error probability of each point under maximum a posteriori decisions, given that it is sent.
 * @param constellation points with their probabilities
 * @param n0 noise density N0 above 0, signal units squared
 * @returns M probabilities; Σ p_i of them is serMap; 1 for a point whose cell has vanished
 * @throws ModulationError as serMap
 */
export function serMapByPoint(constellation: Constellation, n0: number): Float64Array {
  return errorsOf(mapCells(constellation, n0))
}

function errorsOf({ n0, offsets, edges, outside, vanished }: MapCells): Float64Array {
  return Float64Array.from(outside, (isOutside, i) => {
    if (vanished[i]) return 1
    // Noise brings an outside point home through the near edges and carries it past the far ones.
    let sum = isOutside
    for (let entry = offsets[i]!; entry < offsets[i + 1]!; entry++) {
      sum += edgeFlow(edges.h[entry]!, edges.t1[entry]!, edges.t2[entry]!, n0)
    }
    return sum
  })
}

/**
 * Union bound of the symbol error rate of maximum a posteriori decisions, over the neighbours whose boundaries bear edges of a point's cell.
 * @param constellation points with their probabilities
 * @param n0 noise density N0 above 0, signal units squared
 * @returns may exceed 1; a point whose cell has vanished adds its probability
 * @throws ModulationError as serMap
 * @see methods §2
 */
export function serMapUnion(constellation: Constellation, n0: number): number {
  const { offsets, edges, vanished } = mapCells(constellation, n0)
  return weighted(constellation, Float64Array.from(vanished, (isVanished, i) => {
    let sum = isVanished
    for (let entry = offsets[i]!; entry < offsets[i + 1]!; entry++) sum += q(edges.h[entry]! * Math.sqrt(2 / n0))
    return sum
  }))
}

function weighted(constellation: Constellation, byPoint: Float64Array): number {
  return byPoint.reduce((sum, error, i) => sum + probabilityOf(constellation, i) * error, 0)
}
