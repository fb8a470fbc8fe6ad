import type { InputColumn } from './column'
import { numberListText, parseNumberList } from './entry-lists'
import { factorsText, parseFactors } from './factors-entry'
import { choiceInput, unusedParameter } from './make'
import { latticeChoices } from './words'

const group = 'More dimensions' as const

export const lattice = choiceInput('lattice', latticeChoices, {
  id: 'lattice', title: 'Lattice', group, meaning: 'Lattice whose shortest points about the offset are taken: A2 in two dimensions, D4 in four, E8 in eight.',
}, { width: 10, unused: unusedParameter('lattice', 'a lattice') }, true)

export const offset: InputColumn = {
  id: 'offset', title: 'Offset of the cut', unit: 'minimum distances', group, kind: 'input', type: 'list', fields: ['offset'],
  format: 'plain', round: 'nearest', firstOpening: false, width: 24,
  meaning: 'Lattice: point about which the shortest points are taken, a coordinate for each dimension; left empty: a lattice point.',
  text: inputs => numberListText(inputs.offset),
  parse: parseNumberList('offset'),
  unused: unusedParameter('offset', 'an offset'),
  value: ({ inputs }) => inputs.family === 'lattice' ? numberListText(inputs.offset) || null : null,
}

export const factors: InputColumn = {
  id: 'factors', title: 'Factors', group, kind: 'input', type: 'list', fields: ['factors'],
  format: 'plain', round: 'nearest', firstOpening: false, width: 26,
  meaning: 'Cartesian product: its factors, 2 to 8, as 16-QAM × 4-PAM. All factors are brought to one minimum distance.',
  text: inputs => factorsText(inputs.factors),
  parse: parseFactors,
  unused: unusedParameter('factors', 'factors'),
  value: ({ inputs }) => inputs.family === 'product' ? factorsText(inputs.factors) || null : null,
}
