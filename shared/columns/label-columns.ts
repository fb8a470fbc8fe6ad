import { familyLabels, naturalLabels } from '../modulation/labels'
import type { CandidateInputs } from '../schemas/candidates'
import { familyOfRow, familyParameters, rowSize } from '../study/family-parameters'
import type { Entry, InputColumn } from './column'
import { choiceEntry, parseFraction } from './entry'
import { plain } from './format'
import { choiceInput, numberInput, unusedByEntered } from './make'
import { decisionChoices, labellingChoices, probabilityChoices } from './words'

const group = 'Labels, probabilities, decisions' as const

/** Labels that the row has, for own ones to begin with; null where it has none. */
function presentLabels(inputs: CandidateInputs): string[] | null {
  const { order } = rowSize(inputs)
  const family = familyOfRow(inputs)
  if (!family || order === null || family.validate(familyParameters(inputs)).length > 0) return null
  return (inputs.labelling === 'natural' ? null : familyLabels(family.id, familyParameters(inputs))) ?? naturalLabels(order)
}

export const labelling: InputColumn = {
  ...choiceInput('labelling', labellingChoices, {
    id: 'labelling', title: 'Labels', group,
    meaning: 'Bits of each point: the family\'s own (Gray where it has one), natural binary in the order of the points, or yours, which begin with those that the row has.',
  }, { width: 16, unused: unusedByEntered('labels') }),
  parse: (text, inputs) => {
    const entry = choiceEntry('labelling', labellingChoices)(text)
    if ('refused' in entry || entry.change.labelling !== 'own' || !inputs || inputs.labels) return entry
    return { change: { ...entry.change, labels: presentLabels(inputs) } }
  },
}

const words = (text: string) => text.split(/[\s;,]+/).filter(word => word !== '')

const parseLabels = (text: string): Entry => {
  const labels = words(text)
  if (labels.length === 0) return { change: { labels: null } }
  const bad = labels.find(label => !/^[01]+$/.test(label))
  return bad === undefined ? { change: { labels } } : { refused: `“${bad}” is no label: enter words of bits such as 00 01 11 10, one a point.` }
}

const notOwn = ({ family, labelling }: CandidateInputs) =>
  unusedByEntered('labels')({ family }) ?? (labelling === 'own' ? null : 'Used where the labels are your own only.')

export const labels: InputColumn = {
  id: 'labels', title: 'Own labels', group, kind: 'input', type: 'list', fields: ['labels'],
  format: 'plain', round: 'nearest', firstOpening: false, width: 24,
  meaning: 'Your own labels: a word of k bits for each point, in the order of the points, the most significant bit first.',
  text: inputs => inputs.labels?.join(' ') ?? '',
  parse: parseLabels,
  unused: notOwn,
  value: ({ inputs }) => notOwn(inputs) === null ? inputs.labels?.join(' ') ?? null : null,
}

export const probabilityRule: InputColumn = {
  ...choiceInput('probabilityRule', probabilityChoices, {
    id: 'probabilityRule', title: 'Probabilities', group,
    meaning: 'How often each point is sent: all alike, shaped (Maxwell–Boltzmann) to a wanted entropy, or as you enter, which begins with all alike.',
  }, { width: 16, unused: unusedByEntered('probabilities') }),
  parse: (text, inputs) => {
    const entry = choiceEntry('probabilityRule', probabilityChoices)(text)
    if ('refused' in entry || entry.change.probabilityRule !== 'own' || !inputs || inputs.probabilities) return entry
    const { order } = rowSize(inputs)
    return { change: { ...entry.change, probabilities: order === null ? null : Array.from({ length: order }, () => 1 / order) } }
  },
}

export const shapedEntropy = numberInput('shapedEntropy', {
  id: 'shapedEntropy', title: 'Wanted entropy H', unit: 'bit/symbol', group, meaning: 'Entropy that shaped probabilities have.',
}, {
  width: 18,
  unused: inputs => unusedByEntered('probabilities')(inputs) ?? (inputs.probabilityRule === 'shaped' ? null : 'Used where the probabilities are shaped only.'),
})

const parseProbabilities = (text: string): Entry => {
  const pieces = words(text)
  if (pieces.length === 0) return { change: { probabilities: null } }
  const numbers = pieces.map(parseFraction)
  const bad = numbers.indexOf(null)
  return bad < 0
    ? { change: { probabilities: numbers as number[] } }
    : { refused: `“${pieces[bad]}” is no probability: enter numbers such as 0.25 or fractions such as 1/4, one a point.` }
}

const notOwnProbabilities = ({ family, probabilityRule }: CandidateInputs) =>
  unusedByEntered('probabilities')({ family }) ?? (probabilityRule === 'own' ? null : 'Used where the probabilities are your own only.')

const probabilitiesText = ({ probabilities }: CandidateInputs) => probabilities?.map(plain).join(' ') ?? ''

export const probabilities: InputColumn = {
  id: 'probabilities', title: 'Own probabilities', group, kind: 'input', type: 'list', fields: ['probabilities'],
  format: 'plain', round: 'nearest', firstOpening: false, width: 24,
  meaning: 'Your own probabilities, one for each point in the order of the points; their sum is 1.',
  text: probabilitiesText,
  parse: parseProbabilities,
  unused: notOwnProbabilities,
  value: ({ inputs }) => notOwnProbabilities(inputs) === null ? probabilitiesText(inputs) || null : null,
}

export const decision = choiceInput('decision', decisionChoices, {
  id: 'decision', title: 'Decisions', group,
  meaning: 'By minimum distance, or MAP: by the most likely point, which differs where the points are not sent equally often.',
}, { width: 18, unused: unusedByEntered('decisions') })
