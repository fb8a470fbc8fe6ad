import { ModulationError } from '../../../shared/modulation'

/** Where a call is refused: the path of the mistake; null when it is not refused. What is no refusal of the core comes out as it is. */
export function pathOf(call: () => unknown): unknown {
  try {
    call()
  } catch (error) {
    return error instanceof ModulationError ? error.path : error
  }
  return null
}
