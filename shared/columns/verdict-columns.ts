import { tolerances } from '../methods/tolerances'
import { computed, shown, valueColumn } from './make'

const group = 'Verdict' as const
const source = 'Methods §7'

export const verdict = computed({
  id: 'verdict', method: 'margin', title: 'Verdict', group, type: 'text', format: 'plain', firstOpening: true, width: 32,
  meaning: 'Whether every must-have of the study holds, and if not, which fails and by how much.',
  formula: 'passes when every must-have holds, on unrounded numbers', source, tolerance: tolerances.comparison,
  value: row => row.values?.verdict ?? null,
  lines: v => v.checks.map(check => `${check.id} ${check.passes ? 'holds' : 'fails'}: ${check.sentence}`),
})

export const surplus = valueColumn('surplusDb', '+0.00', {
  id: 'surplus', method: 'margin', title: 'Surplus', unit: 'dB', group, round: 'down', firstOpening: true, width: 11,
  meaning: 'Margin minus required margin in the case that decides; rounded down.',
  formula: 'surplus = margin − required margin', source, tolerance: tolerances.marginDb,
  lines: v => [
    `${shown(v.marginDb, '+0.00', 'down')} dB − ${shown(v.requiredMarginDb)} dB = ${shown(v.surplusDb, '+0.00', 'down')} dB${v.decidingCase ? ` (${v.decidingCase})` : ''}`,
    ...v.cases.map(c => `case ${c.name}: ${shown(c.marginDb, '+0.00', 'down')} − ${shown(c.requiredMarginDb)} = ${shown(c.surplusDb, '+0.00', 'down')} dB`),
  ],
})

export const margin = valueColumn('marginDb', '+0.00', {
  id: 'margin', method: 'margin', title: 'Margin', unit: 'dB', group, round: 'down', width: 11,
  meaning: 'Available minus required Es/N0 minus implementation loss, in the case that decides; rounded down.',
  formula: 'margin = available − required − implementation loss', source, tolerance: tolerances.marginDb,
  lines: v => [`${shown(v.availableEsN0Db)} dB − ${shown(v.requiredEsN0Db)} dB − ${shown(v.implementationLossDb)} dB = ${shown(v.marginDb, '+0.00', 'down')} dB`],
})

export const requiredMargin = valueColumn('requiredMarginDb', '0.00', {
  id: 'requiredMargin', method: 'margin', title: 'Required margin', unit: 'dB', group, width: 20,
  meaning: 'Margin that the deciding case asks for.',
  formula: 'of the deciding case, or the study\'s where the case has none', source, tolerance: tolerances.entered,
  lines: v => [`${shown(v.requiredMarginDb)} dB${v.decidingCase ? ` in the case ${v.decidingCase}` : ''}`],
})

export const decidingCase = computed({
  id: 'decidingCase', method: 'margin', title: 'Deciding case', group, type: 'text', format: 'plain', width: 15,
  meaning: 'The link case with the worst surplus.',
  formula: 'the case with the smallest surplus', source, tolerance: tolerances.comparison,
  value: row => row.values?.decidingCase ?? null,
  lines: v => v.cases.map(c => `${c.name}: surplus ${shown(c.surplusDb, '+0.00', 'down')} dB`),
})
