import { tolerances } from '../methods/tolerances'
import { shown, valueColumn } from './make'

const group = 'Geometry' as const

export const minimumDistance = valueColumn('minimumDistance', '0.000', {
  id: 'minimumDistance', method: 'distances', title: 'Minimum distance at Es = 1', group, firstOpening: true, width: 27,
  meaning: 'Smallest distance of two points when the mean energy is 1.',
  formula: 'd_min = min |sᵢ − sⱼ| / √Es', source: 'Methods §1', tolerance: tolerances.closedForm,
  lines: v => [`${shown(v.spacing, 'plain')} / √${shown(v.meanEnergy, 'plain')} = ${shown(v.minimumDistance, 'plain')}`],
})

export const nearestMean = valueColumn('nearestMean', '0.00', {
  id: 'nearestMean', method: 'distances', title: 'Mean nearest neighbours', group, firstOpening: true, width: 25,
  meaning: 'Mean number of points at the minimum distance.',
  formula: 'Ā = Σ pᵢ Aᵢ, Aᵢ the points within (1 + 1e−9)·d_min of sᵢ', source: 'Methods §1', tolerance: tolerances.count,
  lines: v => [`${shown(v.nearestMean, 'plain')} over ${shown(v.order, 'integer')} points`],
})

export const relevantMean = valueColumn('relevantMean', '0.00', {
  id: 'relevantMean', method: 'relevantNeighbours', title: 'Mean relevant neighbours', group, firstOpening: true, width: 26,
  meaning: 'Mean number of points whose bisector bounds a decision region.',
  formula: 'Σ pᵢ |Nᵢ|, Nᵢ the points whose bisector carries an edge of the decision region of sᵢ', source: 'Methods §1; edges decided in exact arithmetic', tolerance: tolerances.neighbours,
  lines: v => [`${shown(v.relevantMean, 'plain')} of the ${shown(v.order === null ? null : v.order - 1, 'integer')} other points bound a decision region, on average`],
})

export const asymptoticEfficiency = valueColumn('asymptoticEfficiencyDb', '0.00', {
  id: 'asymptoticEfficiency', method: 'powerEfficiency', title: 'Asymptotic power efficiency', unit: 'dB', group, width: 32,
  meaning: 'Squared minimum distance per net bit energy against binary antipodal signalling.',
  formula: '10·log10(d_min²/(4·Eb))', source: 'Methods §1', tolerance: tolerances.closedForm,
  lines: v => [`10·log10(${shown(v.minimumDistance, '0.000')}² · ${shown(v.netBits, '0.000')} / 4) = ${shown(v.asymptoticEfficiencyDb)} dB`],
})

export const dimensions = valueColumn('dimensions', 'integer', {
  id: 'dimensions', method: 'model', title: 'Dimensions N', group, width: 13,
  meaning: 'Real coordinates of a point.',
  formula: 'N, the coordinates that each point has', source: 'Methods §0', tolerance: tolerances.count,
  lines: v => [`N = ${shown(v.dimensions, 'integer')}`],
})
