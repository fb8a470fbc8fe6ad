import type { EvaluationRequest } from '#shared/schemas/evaluate'
import type { Issue } from '#shared/schemas/common'

/** Longest evaluation by estimate, in seconds of one thread. */
export const longestEvaluation = 10

/** Error rates that finding a required Es/N0 takes. */
const searchSteps = 12
/** Seconds for one error rate of M points, measured on a slow machine, M the number of points. */
const secondsOf: Record<EvaluationRequest['quantities'][number], (points: number) => number> = {
  serUnion: points => 2e-7 * points,
  serNearest: () => 1e-7,
  serExact: points => 2.5e-6 * points,
  // Of many pairs, those of nearly the same distance are together.
  serAllPairs: points => 6e-8 * Math.min(points * points / 2, 2e5),
}
/** Seconds for putting the distances of all pairs together, once. */
const secondsOfPairs = (points: number) => 5e-8 * points * points

/** Number of points, by whichever parameter gives it: the schema refuses those of other families. */
function countOf({ order, points, rings }: EvaluationRequest['constellation']): number {
  return points?.length ?? rings?.reduce((a, b) => a + b, 0) ?? order ?? 0
}

/** Estimated seconds of an evaluation. */
export function estimatedSeconds({ constellation, esN0Db, target, quantities }: EvaluationRequest): number {
  const count = countOf(constellation)
  const rates = esN0Db.length + (target ? searchSteps : 0)
  const once = 5e-6 * count + (quantities.includes('serAllPairs') ? secondsOfPairs(count) : 0)
  return once + quantities.reduce((sum, quantity) => sum + rates * secondsOf[quantity](count), 0)
}

/** Refusal of an evaluation that would take too long, naming what to reduce. */
export function costIssues(request: EvaluationRequest): Issue[] {
  const seconds = estimatedSeconds(request)
  if (seconds <= longestEvaluation) return []
  const allPairs = request.quantities.includes('serAllPairs')
    && estimatedSeconds({ ...request, quantities: ['serAllPairs'] }) > longestEvaluation / 2
  const message = `This evaluation is estimated at ${Math.ceil(seconds)} s; at most ${longestEvaluation} s are computed. `
  return [allPairs
    ? { path: 'quantities', message: `${message}Leave serAllPairs out, or send fewer points or fewer values of Es/N0.` }
    : { path: 'esN0Db', message: `${message}Send fewer values of Es/N0 or fewer points.` }]
}
