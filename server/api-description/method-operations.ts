import { checksAnswer, methodsAnswer } from '#shared/schemas/methods'
import { tagged } from './operation'

export const methodOperations = tagged('Methods', {
  'GET /api/methods': { summary: 'What every computed column means: methods with their formulas set, sources, and published values.', answer: methodsAnswer },
  'GET /api/methods/checks': { summary: 'What this build computes for each published value. The first call computes them, in a few seconds.', answer: checksAnswer },
})
