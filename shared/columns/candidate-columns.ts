import { parseFraction, numberEntry } from './entry'
import { parseNumberList, numberListText, ringsText } from './entry-lists'
import type { CandidateInputs } from '../schemas/candidates'
import type { InputColumn } from './column'
import { choiceInput, numberInput, textInput, unusedParameter } from './make'
import { formatNumber } from './format'
import { parseRingsOrPreset, ringPresets, ringsSource } from './rings-entry'
import { basisChoices, familyChoices, roleChoices } from './words'

const group = 'Candidate' as const

export const name = textInput('name', {
  id: 'name', title: 'Name', group, meaning: 'Name of the candidate, your own.',
}, { firstOpening: true, width: 26 })

export const family = choiceInput('family', familyChoices, {
  id: 'family', title: 'Family', group,
  meaning: 'The rule that generates the constellation, or entered for a scheme outside the model.',
}, { firstOpening: true, width: 13 })

export const order: InputColumn = {
  ...numberInput('order', {
    id: 'order', title: 'M', group,
    meaning: 'Order: number of points of the constellation; APSK sets, products and custom points count theirs.',
  }, { firstOpening: true, width: 8, format: 'integer' }),
  unused: inputs => inputs.family === 'entered' ? null : unusedParameter('order', 'an order of its own; its points are counted')(inputs),
  value: ({ inputs, values }) => countsItsPoints(inputs.family) ? values?.order ?? null : inputs.order,
}

const countsItsPoints = (id: CandidateInputs['family']) => id === 'apsk' || id === 'custom' || id === 'product'

export const rings: InputColumn = {
  id: 'rings', title: 'Rings/ratios', group, kind: 'input', type: 'list', fields: ['rings', 'ratios'],
  format: 'plain', round: 'nearest', firstOpening: true, width: 22,
  meaning: 'APSK: points on each ring, the innermost first, and the radius of each further ring over that of the first ring of more than one point. The ring sets of ETSI EN 302 307-1 are offered.',
  presets: ringPresets,
  text: inputs => inputs.family === 'apsk' ? ringsText(inputs) : '',
  parse: parseRingsOrPreset,
  source: ringsSource,
  unused: unusedParameter('rings', 'rings and ratios; entering them makes it APSK'),
  value: ({ inputs }) => inputs.family === 'apsk' ? ringsText(inputs) || null : null,
}

export const phases: InputColumn = {
  id: 'phasesDeg', title: 'Ring phases', unit: '°', group, kind: 'input', type: 'list', fields: ['phasesDeg'],
  format: 'plain', round: 'nearest', firstOpening: false, width: 16,
  meaning: 'APSK: angle of each ring\'s first point; left empty: half a step of the ring.',
  text: inputs => numberListText(inputs.phasesDeg),
  parse: parseNumberList('phasesDeg'),
  unused: unusedParameter('phases', 'ring phases'),
  value: ({ inputs }) => inputs.family === 'apsk' ? numberListText(inputs.phasesDeg) || null : null,
}

export const codeRate: InputColumn = {
  ...numberInput('codeRate', { id: 'codeRate', title: 'r', group, meaning: 'Code rate; 1 is uncoded.' },
    { firstOpening: true, width: 7, format: 'fraction' }),
  text: inputs => formatNumber(inputs.codeRate, 'fraction'),
  parse: numberEntry('codeRate', parseFraction),
}

export const basis = choiceInput('basis', basisChoices, {
  id: 'basis', title: 'Basis', group,
  meaning: 'What the required SNR rests on: uncoded (from the error rate), a rate threshold with the decoder\'s gap, or entered with its source.',
}, { firstOpening: true, width: 15 })

export const note = textInput('note', { id: 'note', title: 'Note', group, meaning: 'Anything worth keeping with the row.' }, { firstOpening: true, width: 30 })

export const role = choiceInput('role', roleChoices, {
  id: 'role', title: 'Role', group, meaning: 'What the study has made of the row: reference, chosen, fallback or rejected.',
}, { width: 12 }, true)

export const roleReason = textInput('roleReason', { id: 'roleReason', title: 'Reason for the role', group, meaning: 'Why the row has its role.' })
