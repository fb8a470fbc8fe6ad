import type { Route } from '../access/rules'
import { accountOperations, peopleOperations, sessionOperations } from './account-operations'
import { candidateOperations, evaluationOperations, searchOperations, serverOperations, sweepOperations } from './candidate-operations'
import { methodOperations } from './method-operations'
import type { Operation } from './operation'
import { exportOperations, studyOperations } from './study-operations'

/** Every route of the API as its description has it; the compiler holds it against the access rules. */
export const operations: Record<Route, Operation> = {
  ...serverOperations, ...sessionOperations, ...accountOperations, ...peopleOperations, ...studyOperations,
  ...candidateOperations, ...sweepOperations, ...searchOperations, ...exportOperations, ...evaluationOperations, ...methodOperations,
}
