import type { Constellation } from './constellation'
import { ModulationError } from './errors'
import { familyOf, generate } from './families'
import type { FamilyId, FamilyParameters } from './families'
import type { Interval } from './estimate'
import { familyLabels } from './labels'
import { evolutionFrom, stepEvolution } from './evolution'
import type { Evolution } from './evolution'
import { simplexAbout, sizeOf, step } from './nelder-mead'
import type { Simplex } from './nelder-mead'
import { searchGoal } from './parameter-search-goal'
import type { SearchGoal, SearchLimit } from './parameter-search-goal'
import { completed, parametersAt, placeOf, variablesOf } from './parameter-search-variables'
import type { FreeParameter, SearchBounds, Variable } from './parameter-search-variables'
import { seededRandom } from './random'

export interface ParameterSearchRequest {
  family: FamilyId
  /** where the search begins */
  parameters: FamilyParameters
  /** which of the parameters are searched */
  free: readonly FreeParameter[]
  bounds?: SearchBounds
  goal: SearchGoal
  /** default: mean power */
  limit?: SearchLimit
  /** left out: the family's, where there are some */
  labels?: readonly string[] | null
  /** left out: all alike */
  probabilities?: readonly number[] | null
  /** default 1 */
  seed?: number
  /** evaluations of the goal at most; default 600 a variable */
  budget?: number
  /** simplices, or populations: the first about the start, the last about the best; others begin anywhere; default 4, at least 2 */
  starts?: number
}

/** All that a search knows: plain data that survives JSON, so that it goes on anywhere. */
export interface ParameterSearchState {
  request: ParameterSearchRequest
  variables: Variable[]
  labels: readonly string[] | null
  best: { parameters: FamilyParameters, place: number[], value: number }
  /** the goal at the start, dB */
  startValue: number
  evaluations: number
  budget: number
  starts: number
  /** simplices that are over: at their end, or left as the budget runs out */
  startsDone: number
  /** at work, or the last one: a simplex, or an evolving population where there are many variables */
  simplex: Simplex | Evolution
  /** the goal in the last simplex, dB; the value is the best of all */
  interval: Interval
  done: boolean
  /** the last simplex, about the best place, contracted onto one value within the budget */
  converged: boolean
}

/** The goal in dB where it cannot be had: rings that cross, points that meet, targets out of reach. */
const unreachable = 1e9
const firstStep = 0.08
const polishStep = 0.02
/** A simplex ends when its values differ by less than this, dB, and it is smaller than this part of the bounds … */
const sameValue = 1e-5
const smallSimplex = 1e-3
/** … or when it is this small, as a simulated goal has steps. */
const pointSimplex = 1e-7
/** Values that differ by less, dB, have converged. */
const convergedWithin = 2e-3
/** From this part of the budget on only the last start goes on, about the best. */
const polishFrom = 0.7
/** Of so many variables and more a simplex makes no headway. */
const manyVariables = 7
/** Draws for a start that its family allows. */
const draws = 100

/**
 * Begins a search of a family's free parameters, or of free points, for the lowest goal: Nelder and Mead's simplex from the start, then from
 * seeded places within the bounds, then once more about the best.
 * @param goal in dB; left out: the request's own
 * @throws ModulationError with the path of what is wrong, also when the start itself has no required SNR
 */
export function createParameterSearch(request: ParameterSearchRequest, goal = searchGoal(request.goal, request.limit ?? { by: 'mean' })): ParameterSearchState {
  const start = completed(request.parameters, request.free)
  const variables = variablesOf(request.family, start, request.free, request.bounds ?? {})
  const budget = request.budget ?? 600 * variables.length
  if (!(Number.isInteger(budget) && budget >= 1)) throw new ModulationError('The budget is a whole number of evaluations, from 1.', ['budget'])
  const starts = request.starts ?? 4
  if (!(Number.isInteger(starts) && starts >= 2)) throw new ModulationError('Starts are a whole number, from 2.', ['starts'])
  const labels = request.labels ?? familyLabels(request.family, start)
  const value = goal(generate(request.family, start, { labels, probabilities: request.probabilities }))
  const place = placeOf(variables, start)
  return {
    request, variables, labels, best: { parameters: start, place, value }, startValue: value, evaluations: 1, budget, starts, startsDone: 0,
    simplex: beginning(place, firstStep, seedOf(request, 0)), interval: { value, low: value, high: value }, done: false, converged: false,
  }
}

/**
 * Goes on with a search. What it finds does not depend on how it is cut into slices.
 * @param budgetMs time after which it stops; it takes one step at least
 * @param goal as for createParameterSearch
 * @returns a new state; its best is never worse than the start
 */
export function advanceParameterSearch(
  state: ParameterSearchState, budgetMs: number, goal = searchGoal(state.request.goal, state.request.limit ?? { by: 'mean' }),
): ParameterSearchState {
  const next = structuredClone(state)
  const until = performance.now() + budgetMs
  do takeStep(next, goal)
  while (!next.done && performance.now() < until)
  return next
}

function takeStep(state: ParameterSearchState, goal: (constellation: Constellation) => number): void {
  if (state.done) return
  const f = (place: number[]) => valueAt(state, place, goal)
  if ('mean' in state.simplex) stepEvolution(state.simplex, f)
  else step(state.simplex, f)
  const known = state.simplex.values.filter(value => value !== null && value < unreachable) as number[]
  if (known.length > 0) state.interval = { value: state.best.value, low: Math.min(...known), high: Math.max(...known) }
  const complete = known.length === state.simplex.values.length
  const spread = state.interval.high - state.interval.low
  const size = sizeOf(state.simplex)
  const ended = complete && ((spread <= sameValue && size <= smallSimplex) || size <= pointSimplex)
  const late = state.startsDone < state.starts - 1 && state.evaluations >= polishFrom * state.budget
  if (ended || late) {
    state.startsDone = late ? state.starts - 1 : state.startsDone + 1
    if (state.startsDone === state.starts) {
      state.done = true
      state.converged = spread <= convergedWithin
    } else {
      state.simplex = nextSimplex(state)
    }
  }
  if (state.evaluations >= state.budget) state.done = true
}

function valueAt(state: ParameterSearchState, place: number[], goal: (constellation: Constellation) => number): number {
  const { request: { family, probabilities }, variables, labels, best } = state
  if (state.evaluations >= state.budget) return unreachable
  const parameters = parametersAt(variables, best.parameters, place)
  state.evaluations++
  const value = reached(() => goal(generate(family, parameters, { labels, probabilities })))
  if (value < best.value) state.best = { parameters, place, value }
  return value
}

function reached(compute: () => number): number {
  try {
    return compute()
  } catch (error) {
    if (error instanceof ModulationError) return unreachable
    throw error
  }
}

const seedOf = ({ seed = 1 }: ParameterSearchRequest, start: number) => seed * 1000 + start

function beginning(place: readonly number[], size: number, seed: number): Simplex | Evolution {
  return place.length < manyVariables ? simplexAbout(place, size) : evolutionFrom(place, size / 2, seed)
}

/** Anywhere that the family allows; the last one about the best. */
function nextSimplex({ request, variables, best, starts, startsDone }: ParameterSearchState): Simplex | Evolution {
  const seed = seedOf(request, startsDone)
  if (startsDone === starts - 1) return beginning(best.place, polishStep, seed)
  const random = seededRandom(seed)
  for (let draw = 0; draw < draws; draw++) {
    const place = variables.map(() => random())
    if (familyOf(request.family).validate(parametersAt(variables, best.parameters, place)).length === 0) return beginning(place, firstStep, seed)
  }
  return beginning(best.place, firstStep, seed)
}
