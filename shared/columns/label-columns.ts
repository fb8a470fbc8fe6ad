import type { CandidateInputs } from '../schemas/candidates'
import type { Entry, InputColumn } from './column'
import { parseFraction } from './entry'
import { plain } from './format'
import { choiceInput, numberInput, unusedByEntered } from './make'
import { decisionChoices, labellingChoices, probabilityChoices } from './words'

const group = 'Labels, probabilities, decisions' as const

export const labelling = choiceInput('labelling', labellingChoices, {
  id: 'labelling', title: 'Labels', group,
  meaning: 'Bits of each point: the family\'s own (Gray where it has one), natural binary in the order of the points, or yours.',
}, { width: 16, unused: unusedByEntered('labels') })

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

export const probabilityRule = choiceInput('probabilityRule', probabilityChoices, {
  id: 'probabilityRule', title: 'Probabilities', group,
  meaning: 'How often each point is sent: all alike, shaped (Maxwell–Boltzmann) to a wanted entropy, or as you enter.',
}, { width: 16, unused: unusedByEntered('probabilities') })

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
