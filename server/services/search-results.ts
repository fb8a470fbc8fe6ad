import type { CandidateInputs } from '#shared/schemas/candidates'
import { describeCandidate } from '#shared/study/describe-candidate'
import type { FamilyParameters } from '#shared/modulation'
import type { StoredSearch } from '../database/schema'
import type { SearchState } from '../compute/search'
import { progressOf } from './search-rows'

const inDegrees = (radians: number) => radians * 180 / Math.PI

/** Inputs of the parameters that were searched. */
function inputsOf({ ratios, phases, offset, points }: FamilyParameters, searched: readonly string[]): Partial<CandidateInputs> {
  return {
    ...searched.includes('ratios') ? { ratios: [...ratios!] } : {},
    ...searched.includes('phases') ? { phasesDeg: phases!.map(inDegrees) } : {},
    ...searched.includes('offset') ? { offset: [...offset!] } : {},
    ...searched.includes('points') ? { points: points!.map(point => [...point]) } : {},
  }
}

const digits = (value: number, unit: string | null) => unit ? `${value.toFixed(4)} ${unit}` : value.toPrecision(4)

/** How a row was found, for its note. */
function foundBy(search: SearchState, { asked, inputs }: StoredSearch): string {
  const { what, unit, startValue, value, evaluations, converged, low, high } = progressOf(search)
  const end = converged
    ? ''
    : ` The search ended without having converged${low !== null && high !== null ? `: its last steps lay between ${digits(low, unit)} and ${digits(high, unit)}` : ''}.`
  return `Found by a search for ${search.kind} from “${inputs.name}”: ${what} from ${digits(startValue, unit)} to ${digits(value, unit)}; seed ${asked.seed}, `
    + `${evaluations.toLocaleString('en')} ${search.kind === 'labels' ? 'exchanges tried' : 'evaluations'}.${end}`
}

/** Whether a search has found something better than its start. */
export const isBetter = (search: SearchState): boolean => {
  const { startValue, value } = progressOf(search)
  return value < startValue
}

/** The row that a search makes: the one that was searched with what was found, saying how. */
export function foundInputs(search: SearchState, stored: StoredSearch): CandidateInputs {
  const { inputs } = stored
  const found: CandidateInputs = {
    ...inputs,
    ...search.kind === 'labels' ? { labelling: 'own', labels: [...search.state.labels] } : inputsOf(search.state.best.parameters, search.state.request.free),
    role: null, roleReason: '', note: `${foundBy(search, stored)}${inputs.note ? `\n${inputs.note}` : ''}`.slice(0, 2000),
  }
  const described = describeCandidate(found)
  const name = inputs.name === describeCandidate(inputs) && described !== inputs.name
    ? described
    : `${inputs.name.slice(0, 100)}, ${search.kind} searched`
  return { ...found, name }
}
