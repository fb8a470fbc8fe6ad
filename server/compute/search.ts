import { advanceLabelSearch, createLabelSearch, ModulationError, shapedProbabilities, withProbabilities } from '#shared/modulation'
import type { Constellation, LabelSearchState } from '#shared/modulation'
import { advanceParameterSearch, createParameterSearch } from '#shared/modulation/parameter-search'
import type { ParameterSearchState } from '#shared/modulation/parameter-search'
import { searchGoal } from '#shared/modulation/parameter-search-goal'
import type { SearchGoal, SearchLimit } from '#shared/modulation/parameter-search-goal'
import type { Issue } from '#shared/schemas/common'
import type { SearchCreation } from '#shared/schemas/searches'
import type { CanonicalInputs } from '#shared/study/canonical-inputs'
import { constellationOf, labelledGeometryOf, noiseDensityAt } from './points'
import { rowPath } from './row-path'
import { availableAt, settingOf } from './setting'

/** What is to be searched: the request, and the row as it was then. */
export interface SearchTask { asked: SearchCreation, row: CanonicalInputs }

/** Where a search stands: plain data, from which any worker goes on. */
export type SearchState
  = | { kind: 'labels', availableEsN0Db: number, state: LabelSearchState }
    | { kind: 'parameters', goal: SearchGoal, state: ParameterSearchState }

type Asked<K extends SearchCreation['kind']> = Extract<SearchCreation, { kind: K }>

const refusal = (message: string, path: string) => new ModulationError(message, [path])

/** Searches lower what minimum-distance decisions need with white Gaussian noise alone. */
function requirePlain({ channel, phaseErrorDeg, decision }: CanonicalInputs): void {
  if (channel) throw refusal('A search is for the AWGN channel: use it in the row that is searched.', 'channel')
  if (phaseErrorDeg) throw refusal('A search is without a phase error: enter 0 in the row that is searched.', 'phaseErrorDeg')
  if (decision) throw refusal('A search is for decisions by minimum distance: choose them in the row that is searched.', 'decision')
}

function pointsOf({ constellation }: CanonicalInputs) {
  if (constellation) return constellation
  throw refusal('An entered scheme has no points to search.', 'family')
}

function beginLabels({ seed, starts }: Asked<'labels'>, row: CanonicalInputs): SearchState {
  const { constellation } = labelledGeometryOf(pointsOf(row))
  const availableEsN0Db = availableAt(row, settingOf(row))
  const state = createLabelSearch({ constellation, n0: noiseDensityAt(constellation, availableEsN0Db), seed, starts })
  if (state.startBer === 0) throw refusal('The bit error rate is 0 to a double at this Es/N0: lower the available Es/N0.', 'requirements.available')
  return { kind: 'labels', availableEsN0Db, state }
}

/** What the row's own required SNR rests on, unless something else is asked for. */
function goalOf({ goal }: Asked<'parameters'>, { threshold, study }: CanonicalInputs, netBits: number): SearchGoal {
  const kind = goal ?? threshold?.kind ?? study.target.quantity
  return kind === 'ser' || kind === 'ber' ? { kind, target: study.target.value } : { kind, netBits }
}

/** With a peak-limited amplifier the back-off counts, by the row's own rule; an entered one does not change. */
function limitOf({ study, backOff, rollOff }: CanonicalInputs): SearchLimit {
  if (study.limitedBy === 'meanPower' || backOff.by === 'entered' || backOff.by === 'none') return { by: 'mean' }
  return { by: 'peak', backOff: backOff.by === 'papr' ? 'papr' : { rollOff, exceedance: backOff.exceedance } }
}

/** The goal in dB. Unless something else is asked for, a target before decoding counts beside the rate threshold, as in the row. */
function requiredOf({ goal: chosen }: Asked<'parameters'>, row: CanonicalInputs, goal: SearchGoal): (constellation: Constellation) => number {
  const { threshold, study: { target } } = row
  const limit = limitOf(row)
  const required = searchGoal(goal, limit)
  if (chosen || threshold?.stage !== 'beforeDecoding') return required
  const before = searchGoal({ kind: target.quantity, target: target.value }, limit)
  return constellation => Math.max(required(constellation) + threshold.decoderGapDb, before(constellation))
}

/** The same with probabilities that are shaped anew for all points that are tried, where the row's are: the found row shapes its own too. */
function goalFunction(asked: Asked<'parameters'>, row: CanonicalInputs, goal: SearchGoal): (constellation: Constellation) => number {
  const required = requiredOf(asked, row, goal)
  const probabilities = row.constellation?.probabilities
  if (!probabilities || Array.isArray(probabilities)) return required
  return constellation => required(withProbabilities(constellation, shapedProbabilities(constellation, probabilities.entropy)))
}

const inRadians = ([low, high]: readonly [number, number]) => [low * Math.PI / 180, high * Math.PI / 180] as const

function beginParameters(asked: Asked<'parameters'>, row: CanonicalInputs): SearchState {
  const points = pointsOf(row)
  const { labels } = constellationOf(points)
  const probabilities = Array.isArray(points.probabilities) ? points.probabilities : null
  const goal = goalOf(asked, row, settingOf(row).netBits)
  const { phases, ...bounds } = asked.bounds
  const state = createParameterSearch({
    family: points.family, parameters: points.parameters, free: asked.free, bounds: { ...bounds, ...(phases && { phases: inRadians(phases) }) },
    goal, limit: limitOf(row), labels, probabilities, seed: asked.seed, starts: asked.starts, budget: asked.budget,
  }, goalFunction(asked, row, goal))
  return { kind: 'parameters', goal, state }
}

function begin({ asked, row }: SearchTask): SearchState {
  requirePlain(row)
  return asked.kind === 'labels' ? beginLabels(asked, row) : beginParameters(asked, row)
}

function advance({ asked, row }: SearchTask, search: SearchState, milliseconds: number): SearchState {
  if (search.kind === 'labels') return { ...search, state: advanceLabelSearch(search.state, { milliseconds }) }
  const goal = asked.kind === 'parameters' ? goalFunction(asked, row, search.goal) : undefined
  return { ...search, state: advanceParameterSearch(search.state, milliseconds, goal) }
}

/**
 * Begins a search, or goes on with one.
 * @param state where it stands; null: at the beginning
 * @param milliseconds how long to go on; one step at least
 * @returns where it stands then; issues for a search that cannot begin
 */
export function search(task: SearchTask, state: SearchState | null, milliseconds: number): { state: SearchState } | { issues: Issue[] } {
  try {
    if (!state) return { state: begin(task) }
    return { state: advance(task, state, milliseconds) }
  } catch (error) {
    if (!(error instanceof ModulationError)) throw error
    return { issues: [{ path: rowPath(error.path), message: error.message }] }
  }
}
