import type { EvaluationRequest } from '#shared/schemas/evaluate'
import type { Issue } from '#shared/schemas/common'
import { latticeDimensions } from '#shared/modulation/families/lattice-cut'
import { geometrySeconds, latticeSeconds } from '#shared/study/geometry-cost'

/** Longest evaluation by estimate, in seconds of one thread. */
export const longestEvaluation = 12

/** Error rates that finding a required Es/N0 takes. */
const searchSteps = 12
/** Rates simulated for sets of more than two dimensions take about the same for any number of points. */
const secondsOfSimulation = 0.5

const informationRate = (points: number, dimensions: number) => dimensions > 2 ? secondsOfSimulation : 3e-3 * points ** 0.65

/** Seconds for one value of one SNR, measured on a slow machine with scattered points, M the number of points. */
const secondsOf: Record<EvaluationRequest['quantities'][number], (points: number, dimensions: number) => number> = {
  serUnion: points => 2e-7 * points,
  serNearest: () => 1e-7,
  serExact: points => 2.5e-6 * points,
  // Of many pairs, those of nearly the same distance are together.
  serAllPairs: points => 6e-8 * Math.min(points * points / 2, 2e5),
  berNearest: points => 2e-7 * points,
  berAllPairs: points => 6e-8 * Math.min(points * points / 2, 2e5),
  berExact: points => 1.2e-6 * points ** 1.75,
  mutualInformation: informationRate,
  bitMetricRate: informationRate,
}
const ofPairs: readonly string[] = ['serAllPairs', 'berAllPairs']
/** Seconds for putting the distances of all pairs together, once. */
const secondsOfPairs = (points: number) => 5e-8 * points * points

/**
 * Number of points, and of coordinates of the largest part, by whichever parameter gives them: the schema refuses those of other families.
 * The rates of a product are found a factor at a time.
 */
function sizeOf({ order, points, rings, lattice, factors }: EvaluationRequest['constellation']): { points: number, dimensions: number } {
  const one = ({ order = 1, rings }: { order?: number, rings?: number[] }) => rings?.reduce((a, b) => a + b, 0) ?? order
  return {
    points: points?.length ?? factors?.reduce((product, factor) => product * one(factor), 1) ?? one({ order, rings }),
    dimensions: points?.[0]?.length ?? Math.max(...[{ lattice }, ...factors ?? []].map(part => part.lattice ? latticeDimensions[part.lattice] : 2)),
  }
}

/** Scattered points and lattice cuts are looked at pair by pair; the other families of more dimensions have structure. */
const geometryOf = (constellation: EvaluationRequest['constellation']) =>
  constellation.points ? geometrySeconds(constellation.points.length, constellation.points[0]!.length) : latticeSeconds(constellation)

/** Estimated seconds of an evaluation. */
export function estimatedSeconds({ constellation, esN0Db, target, quantities }: EvaluationRequest): number {
  const { points, dimensions } = sizeOf(constellation)
  const rates = esN0Db.length + (target ? searchSteps : 0)
  const once = 5e-6 * points + geometryOf(constellation) + (quantities.some(quantity => ofPairs.includes(quantity)) ? secondsOfPairs(points) : 0)
  return once + quantities.reduce((sum, quantity) => sum + rates * secondsOf[quantity](points, dimensions), 0)
}

/** Refusal of an evaluation that would take too long, naming what to reduce. */
export function costIssues(request: EvaluationRequest): Issue[] {
  const seconds = estimatedSeconds(request)
  if (seconds <= longestEvaluation) return []
  if (geometryOf(request.constellation) > longestEvaluation / 2) {
    const { points, factors } = request.constellation
    return [{
      path: `constellation.${points ? 'points' : factors ? 'factors' : 'order'}`,
      message: `This evaluation is estimated at ${Math.ceil(seconds)} s; at most ${longestEvaluation} s are computed. Send fewer points, or points of fewer coordinates.`,
    }]
  }
  const costly = request.quantities.filter(quantity => estimatedSeconds({ ...request, quantities: [quantity] }) > longestEvaluation / 2)
  const message = `This evaluation is estimated at ${Math.ceil(seconds)} s; at most ${longestEvaluation} s are computed. `
  const separable = costly.length > 0 && costly.length < request.quantities.length
  return [separable || costly.some(quantity => ofPairs.includes(quantity))
    ? { path: 'quantities', message: `${message}Leave ${new Intl.ListFormat('en-GB').format(costly)} out, or send fewer points or fewer values of Es/N0.` }
    : { path: 'esN0Db', message: `${message}Send fewer values of Es/N0 or fewer points.` }]
}
