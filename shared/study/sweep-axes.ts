import { apskPresets } from '../modulation'
import type { FamilyParameter } from '../modulation'
import { candidateInputs } from '../schemas/candidates'
import type { CandidateInputs } from '../schemas/candidates'
import type { Issue } from '../schemas/common'
import { presetFields } from '../schemas/sweeps'
import type { SweepAxis, SweepField } from '../schemas/sweeps'
import { presetInputs, presetOf } from './apsk-presets'
import { familyOfRow } from './family-parameters'
import { mostValues, snrGrid, valuesOfRange } from './snr-grid'

type Value = number | string | number[]

/** Values of an axis, or what is wrong with them, at paths of the axis. */
export function axisValues(axis: SweepAxis, n: number): { values: Value[], issues: Issue[] } {
  const at = (path: string, message: string): Issue => ({ path: `axes.${n}.${path}`, message })
  let values: Value[]
  if ('values' in axis) {
    values = axis.values
  } else {
    const { start, stop, step } = axis
    if (stop < start) return { values: [], issues: [at('stop', 'The range runs backwards: its stop is at or above its start.')] }
    if (valuesOfRange(start, stop, step) > mostValues) {
      return { values: [], issues: [at('step', 'A range has at most 1,001 values: enter a larger step or a shorter range.')] }
    }
    values = snrGrid(start, stop, step)
  }
  const wrong = values.map(value => sentenceAgainst(axis.field, value))
  const issues = wrong.flatMap((message, i) => message ? [at('values' in axis ? `values.${i}` : 'start', message)] : [])
  return { values, issues: 'values' in axis ? issues : issues.slice(0, 1) }
}

function sentenceAgainst(field: SweepField, value: Value): string | null {
  if (field === 'preset') return presetOf(value) ? null : `A preset is one of ${apskPresets.map(preset => preset.title).join(', ')}.`
  const [name] = field.split('.') as [keyof typeof candidateInputs.shape]
  const parsed = candidateInputs.shape[name].safeParse(name === 'ratios' ? [value] : value)
  return parsed.success ? null : parsed.error.issues[0]!.message
}

/** Inputs with one parameter set, or with all that a preset sets. */
export function withValue(inputs: CandidateInputs, field: SweepField, value: Value): CandidateInputs {
  if (field === 'preset') return { ...inputs, ...presetInputs(presetOf(value)!) }
  const [name, index] = field.split('.')
  if (index === undefined) return { ...inputs, [name!]: value }
  // A gap before this ratio is no number; the family's validation then says how many ratios there are.
  const ratios = Array.from({ length: Math.max(inputs.ratios?.length ?? 0, Number(index) + 1) }, (_, i) => inputs.ratios?.[i] ?? NaN)
  ratios[Number(index)] = value as number
  return { ...inputs, ratios }
}

/** Axes on which the points depend. */
export const constellationFields: readonly SweepField[] = ['preset', ...presetFields]

/**
 * Whether a row's numbers depend on a parameter. Those that do not are not multiplied out:
 * every further value would only repeat the row.
 */
export function depends(inputs: CandidateInputs, field: SweepField): boolean {
  const [name] = field.split('.')
  if (name === 'spacing') return inputs.normalisation === 'minimumDistance' && inputs.family !== 'entered'
  if (name === 'normalisation') return inputs.family !== 'entered'
  if (name === 'backOffDb') return inputs.backOff === 'entered'
  if (name === 'decoderGapDb') return inputs.basis === 'rateThreshold' && inputs.family !== 'entered'
  if (name === 'shapedEntropy') return inputs.probabilityRule === 'shaped' && inputs.family !== 'entered'
  if (name === 'branches') return inputs.channel !== 'awgn' && inputs.family !== 'entered'
  if (name === 'codeRate' || name === 'phaseErrorDeg') return inputs.family !== 'entered'
  if (name === 'order' || name === 'rings' || name === 'ratios') {
    return familyOfRow(inputs)?.parameters.includes(name satisfies FamilyParameter) ?? false
  }
  return true
}
