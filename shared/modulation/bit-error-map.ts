import { labelWords } from './bit-error-labels'
import type { Constellation } from './constellation'
import { probabilityOf } from './constellation'
import { mapCells } from './power-diagram'
import { diagramEdgesOf, wrongBitsAt } from './wrong-bits'
import { serMapOf } from './symbol-error-map'

/** Edges too far away to matter may together take this part of the sum: methods §3. */
const negligible = 1e-10

/**
 * Exact mean bit error rate of maximum a posteriori symbol decisions, for one or two dimensions, any probabilities and any labels.
 * @param constellation points with labels and their probabilities
 * @param n0 noise density N0 above 0, signal units squared
 * @returns probability; relative error below 1e-8
 * @throws ModulationError with path ['labels'] when there are none, ['dimensions'] for more than two, ['n0'] when N0 is not positive and finite
 * @see methods §2, §3; Szczecinski et al. 2003
 */
export function berMap(constellation: Constellation, n0: number): number {
  const words = labelWords(constellation)
  const cells = mapCells(constellation, n0)
  const diagram = diagramEdgesOf(cells)
  const { order, dimensions, points, bitsPerSymbol } = constellation
  // A symbol in error has a wrong bit or more; an edge at distance r carries at most ½·exp(−r²/N0), and k bits a symbol.
  const room = Math.log(diagram.a.length * bitsPerSymbol / 2 / negligible / Math.max(serMapOf(cells), Number.MIN_VALUE))
  let sum = 0
  for (let i = 0; i < order; i++) {
    const home = cells.outside[i] || cells.vanished[i] ? decidedAt(constellation, i, n0) : i
    const [x, y] = [points[dimensions * i]!, dimensions === 1 ? 0 : points[2 * i + 1]!]
    sum += probabilityOf(constellation, i) * wrongBitsAt(diagram, words, words[i]!, x, y, home, n0, n0 * room)
  }
  return sum / bitsPerSymbol
}

/** The other point for which the place of point i is decided: the one of the largest p·exp(−r²/N0). */
function decidedAt(constellation: Constellation, i: number, n0: number): number {
  const { order, dimensions, points } = constellation
  let best = i
  let score = -Infinity
  for (let j = 0; j < order; j++) {
    if (j === i) continue
    let square = 0
    for (let n = 0; n < dimensions; n++) square += (points[dimensions * j + n]! - points[dimensions * i + n]!) ** 2
    const value = Math.log(probabilityOf(constellation, j)) - square / n0
    if (value > score) {
      best = j
      score = value
    }
  }
  return best
}
