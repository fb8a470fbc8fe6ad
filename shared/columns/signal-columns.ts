import { tolerances } from '../methods/tolerances'
import type { InputColumn } from './column'
import { parsePoints, parseSnrRange, pointsText, snrRangeText } from './entry-lists'
import { choiceInput, numberInput, shown, unusedParameter, valueColumn } from './make'
import { normalisationChoices } from './words'

const group = 'Signal and model' as const

export const snrRange: InputColumn = {
  id: 'snrRange', title: 'SNR range', unit: 'dB', group, kind: 'input', type: 'list', fields: ['snrStart', 'snrStop', 'snrStep'],
  format: 'plain', round: 'nearest', firstOpening: true, width: 18,
  meaning: 'Es/N0 from start to stop in steps, over which the row\'s curves are drawn.',
  text: snrRangeText,
  parse: parseSnrRange,
  value: row => snrRangeText(row.inputs),
}

export const points: InputColumn = {
  id: 'points', title: 'Points', group, kind: 'input', type: 'points', fields: ['points'],
  format: 'plain', round: 'nearest', firstOpening: false, width: 14,
  meaning: 'Custom: the points, one a line, as coordinates in signal units.',
  text: inputs => pointsText(inputs.points),
  parse: parsePoints,
  unused: unusedParameter('points', 'points of your own'),
  value: ({ inputs }) => inputs.family === 'custom' && inputs.points ? `${inputs.points.length} points` : null,
}

export const normalisation = choiceInput('normalisation', normalisationChoices, {
  id: 'normalisation', title: 'Normalisation', group,
  meaning: 'How the points are scaled: unit mean energy, unit peak energy, or a fixed minimum distance.',
}, { width: 18 })

export const spacing = numberInput('spacing', {
  id: 'spacing', title: 'Spacing', unit: 'signal units', group, meaning: 'Minimum distance that the points are scaled to, where that is the normalisation.',
}, { width: 22, unused: inputs => inputs.normalisation === 'minimumDistance' ? null : 'Spacing is used with normalisation to minimum distance only.' })

export const meanEnergy = valueColumn('meanEnergy', '0.000', {
  id: 'meanEnergy', method: 'model', title: 'Mean energy Es', unit: 'signal units²', group, width: 22,
  meaning: 'Mean energy of the points about the origin, after normalisation.',
  formula: 'Es = Σ pᵢ |sᵢ|²', source: 'Methods §0', tolerance: tolerances.closedForm,
  lines: v => [`Es = ${shown(v.meanEnergy, 'plain')} over ${shown(v.order, 'integer')} points`],
})

export const peakEnergy = valueColumn('peakEnergy', '0.000', {
  id: 'peakEnergy', method: 'model', title: 'Peak energy Epk', unit: 'signal units²', group, width: 23,
  meaning: 'Energy of the outermost point, after normalisation.',
  formula: 'Epk = max |sᵢ|²', source: 'Methods §0', tolerance: tolerances.closedForm,
  lines: v => [`Epk = ${shown(v.peakEnergy, 'plain')}`],
})

export const signalDistance = valueColumn('spacing', '0.000', {
  id: 'signalDistance', method: 'distances', title: 'Minimum distance', unit: 'signal units', group, width: 23,
  meaning: 'Smallest distance of two points in signal units, after normalisation.',
  formula: 'd_min = min |sᵢ − sⱼ|', source: 'Methods §1', tolerance: tolerances.closedForm,
  lines: v => [`d_min = ${shown(v.spacing, 'plain')}`],
})
