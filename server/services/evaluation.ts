import type { Evaluation } from '#shared/modulation'
import type { EvaluationRequest } from '#shared/schemas/evaluate'
import { costIssues } from '../compute/cost'
import { compute } from '../compute/pool'
import { problem } from '../utils/problem'

/**
 * Evaluates a constellation in a worker.
 * @throws a 422 problem for what the core refuses, and for an evaluation above the cost limit, naming what to reduce
 */
export async function evaluateRequest(request: EvaluationRequest, signal: AbortSignal): Promise<Evaluation> {
  const tooCostly = costIssues(request)
  if (tooCostly.length > 0) return problem(422, tooCostly[0]!.message, { errors: tooCostly })
  const answer = await compute({ kind: 'evaluation', asked: request }, { priority: 'evaluation', signal })
  if ('issues' in answer) return problem(422, answer.issues[0]!.message, { errors: answer.issues })
  return answer.evaluation
}
