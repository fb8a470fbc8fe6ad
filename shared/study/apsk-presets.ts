import { apskPresets } from '../modulation/families'
import type { ApskPreset } from '../modulation/families'
import type { CandidateInputs } from '../schemas/candidates'

/** The standard that the presets are taken from. */
export const presetSource = 'ETSI EN 302 307-1'

/** Degrees of the standard's angles, which are whole ones, without the rounding of π. */
const degrees = (radians: number) => Math.round(radians * 180 / Math.PI * 1e6) / 1e6

/** The inputs of a row that a published ring set fixes. */
export const presetInputs = ({ rings, ratios, phases }: ApskPreset) => ({
  family: 'apsk', order: rings.reduce((sum, n) => sum + n, 0), rings: [...rings], ratios: [...ratios], phasesDeg: phases.map(degrees),
}) satisfies Partial<CandidateInputs>

/** The preset of a title such as "16-APSK 9/10"; undefined for whatever is no such title. */
export const presetOf = (title: unknown): ApskPreset | undefined => apskPresets.find(preset => preset.title === title)

const same = (a: readonly number[] | null, b: readonly number[]) => a !== null && a.length === b.length && a.every((value, i) => value === b[i])

/** The published ring set that a row has, its ring phases included; null where it has none of them. */
export function presetOfRow({ family, rings, ratios, phasesDeg }: CandidateInputs): ApskPreset | null {
  if (family !== 'apsk' || !rings) return null
  const angles = phasesDeg ?? rings.map(n => 180 / n)
  return apskPresets.find((preset) => {
    const its = presetInputs(preset)
    return same(rings, its.rings) && same(ratios, its.ratios) && same(angles, its.phasesDeg)
  }) ?? null
}
