import { defaultInputs } from '../schemas/candidates'
import type { CandidateInputs } from '../schemas/candidates'
import type { Issue } from '../schemas/common'
import type { SweepCreation, SweepField } from '../schemas/sweeps'
import { describeCandidate } from './describe-candidate'
import { constellationIssues, settingIssues } from './input-issues'
import { axisValues, constellationFields, depends, withValue } from './sweep-axes'

/** Most rows of one sweep. */
export const mostSweepRows = 10_000
/** Most combinations that are looked through for those that a family has. */
const mostCombinations = 200_000

/** A sweep multiplied out, without its rows having been made. */
export interface SweepPlan {
  /** rows that it makes; 0 while there are issues */
  rows: number
  /** inputs of row i of 0 … rows − 1; the last axis runs fastest */
  make: (i: number) => CandidateInputs
  /** combinations that make no row, and why the first of them does not */
  leftOut: { count: number, reason: string | null }
  /** what is wrong with the sweep; paths of the request */
  issues: Issue[]
}

const refused = (issues: Issue[]): SweepPlan =>
  ({ rows: 0, make: () => { throw new RangeError('A sweep with mistakes makes no rows.') }, leftOut: { count: 0, reason: null }, issues })

const number = (n: number) => n.toLocaleString('en')

/**
 * Multiplies a sweep's lists and ranges out. Combinations that a family cannot have are left out and counted,
 * and so are those that would repeat a row, because its numbers do not depend on the parameter or because a list has a value twice.
 */
export function expandSweep(definition: SweepCreation): SweepPlan {
  const axes = definition.axes.map((axis, n) => {
    const { values, issues } = axisValues(axis, n)
    return { field: axis.field, values, issues, repeats: repeatsOf(values) }
  })
  const issues = axes.flatMap(axis => axis.issues)
  if (issues.length > 0) return refused(issues)
  const combinations = axes.reduce((product, axis) => product * axis.values.length, 1)
  if (combinations > mostCombinations) {
    return refused([{ path: 'axes', message: `These parameters make ${number(combinations)} combinations; a sweep makes at most 10,000 rows. Shorten a list or a range.` }])
  }

  const base: CandidateInputs = { ...defaultInputs, ...definition.base }
  /** position of each axis at a combination */
  const positions = (combination: number) => {
    const at = new Array<number>(axes.length)
    for (let n = axes.length - 1; n >= 0; n--) {
      const { length } = axes[n]!.values
      at[n] = combination % length
      combination = (combination - at[n]!) / length
    }
    return at
  }
  const inputsAt = (at: readonly number[]) => axes.reduce((inputs, axis, n) => withValue(inputs, axis.field, axis.values[at[n]!]!), base)
  const checked = new Map<string, string | null>()
  const constellationSentence = (inputs: CandidateInputs, at: readonly number[]) => {
    const key = at.filter((_, n) => constellationFields.includes(axes[n]!.field)).join()
    if (!checked.has(key)) checked.set(key, constellationIssues(inputs)[0]?.message ?? null)
    return checked.get(key)!
  }
  const reasonAgainst = (at: readonly number[]): string | null => {
    const repeat = axes.find((axis, n) => axis.repeats.has(at[n]!))
    if (repeat) return `A value stands twice in the list for ${wordsOf(repeat.field)}: it is used once.`
    const inputs = inputsAt(at)
    const idle = axes.find((axis, n) => at[n]! > 0 && !depends(inputs, axis.field))
    if (idle) return `A row of this kind does not depend on ${wordsOf(idle.field)}: it is made once.`
    return constellationSentence(inputs, at) ?? settingIssues(inputs)[0]?.message ?? null
  }

  const kept: number[] = []
  let reason: string | null = null
  for (let combination = 0; combination < combinations; combination++) {
    const against = reasonAgainst(positions(combination))
    if (against === null) kept.push(combination)
    else reason ??= against
  }
  if (kept.length === 0) return refused([{ path: 'axes', message: `No combination makes a row. ${reason}` }])
  if (kept.length > mostSweepRows) {
    return refused([{ path: 'axes', message: `This sweep makes ${number(kept.length)} rows; at most 10,000 are possible. Shorten a list or a range.` }])
  }
  return {
    rows: kept.length,
    make: (i) => {
      const inputs = inputsAt(positions(kept[i]!))
      return { ...inputs, name: definition.base.name ? `${definition.base.name} ${i + 1}`.slice(0, 120) : describeCandidate(inputs) }
    },
    leftOut: { count: combinations - kept.length, reason },
    issues: [],
  }
}

const words: Partial<Record<SweepField, string>> = {
  'family': 'the family', 'preset': 'the ring set', 'rollOff': 'the roll-off', 'backOff': 'the back-off', 'implementationLossDb': 'the implementation loss',
  'order': 'the order M', 'rings': 'rings', 'ratios.0': 'ring ratios', 'ratios.1': 'ring ratios', 'ratios.2': 'ring ratios',
  'spacing': 'the spacing', 'normalisation': 'the normalisation', 'backOffDb': 'an entered back-off',
  'codeRate': 'the code rate', 'decoderGapDb': 'the decoder gap', 'shapedEntropy': 'the shaped entropy', 'branches': 'the branches', 'phaseErrorDeg': 'the phase error',
}
const wordsOf = (field: SweepField) => words[field] ?? field

/** Places of a list whose value stands at an earlier one. */
function repeatsOf(values: readonly unknown[]): Set<number> {
  const seen = new Set<string>()
  return new Set(values.flatMap((value, i) => {
    const text = JSON.stringify(value)
    if (seen.has(text)) return [i]
    seen.add(text)
    return []
  }))
}
