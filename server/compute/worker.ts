import { checkOutcomes } from '#shared/methods/checks'
import { evaluate, ModulationError } from '#shared/modulation'
import type { EvaluationRequest } from '#shared/modulation'
import { drawConstellation } from './draw-constellation'
import { evaluateCandidate } from './evaluate-candidate'
import { evaluatePart } from './evaluate-part'
import { search } from './search'
import type { Task, Tasks } from './tasks'

function evaluation(request: EvaluationRequest): Tasks['evaluation']['answer'] {
  try {
    return { evaluation: evaluate(request) }
  } catch (error) {
    if (!(error instanceof ModulationError)) throw error
    return { issues: [{ path: error.path.join('.'), message: error.message }] }
  }
}

/** Entry of a worker thread: one task at a time. What it throws is a fault, never a mistake in the inputs. */
export default function work(task: Task): Tasks[Task['kind']]['answer'] {
  switch (task.kind) {
    case 'rows': return task.asked.map(evaluateCandidate)
    case 'part': return task.asked.rows.map(inputs => evaluatePart(task.asked.part, inputs))
    case 'search': return search(task.asked.task, task.asked.state, task.asked.milliseconds)
    case 'evaluation': return evaluation(task.asked)
    case 'checks': return checkOutcomes()
    case 'constellation': return drawConstellation(task.asked)
  }
}
