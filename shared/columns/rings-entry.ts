import { apskPresets } from '../modulation/families'
import type { CandidateInputs } from '../schemas/candidates'
import { presetInputs, presetOfRow, presetSource } from '../study/apsk-presets'
import type { Entry, Preset } from './column'
import { parseRings } from './entry-lists'

/** Ring sets of the standard as the Rings/ratios cell offers them: "4+12 at 2.57 (ETSI 16-APSK 9/10)". */
export const ringPresets: readonly Preset[] = apskPresets.map((preset) => {
  const text = `${preset.rings.join('+')} at ${preset.ratios.map(ratio => ratio.toFixed(2)).join(', ')}`
  return { text, title: `${text} (ETSI ${preset.title})`, change: presetInputs(preset) }
})

/**
 * Reads a preset by its title, or rings and ratios as parseRings does; either makes the row an APSK one.
 * Ring phases that were given for another number of rings go with those rings, for they could not stand beside the new ones.
 * @param inputs of the row, where it is known
 */
export function parseRingsOrPreset(text: string, inputs?: Pick<CandidateInputs, 'phasesDeg'>): Entry {
  const typed = text.trim().toLowerCase()
  const preset = ringPresets.find(({ title }) => title.toLowerCase() === typed)
  if (preset) return { change: preset.change }
  const entry = parseRings(text)
  if (typed === '' || 'refused' in entry) return entry
  const { rings } = entry.change
  const misfit = rings && inputs?.phasesDeg && inputs.phasesDeg.length !== rings.length
  return { change: { family: 'apsk', ...entry.change, ...misfit ? { phasesDeg: null } : {} } }
}

/** Where a row's rings, ratios and phases were published: "16-APSK 9/10 of ETSI EN 302 307-1"; null for rings of one's own. */
export function ringsSource(inputs: CandidateInputs): string | null {
  const preset = presetOfRow(inputs)
  return preset && `${preset.title} of ${presetSource}`
}
