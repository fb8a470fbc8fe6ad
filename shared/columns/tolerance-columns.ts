import { tolerances } from '../methods/tolerances'
import { shown } from './make'
import { partColumn } from './part-column'

export const largestRotation = partColumn('tolerances', 'largestRotationDeg', {
  id: 'largestRotation', method: 'noiselessTolerances', title: 'Largest rotation', unit: '°', group: 'Geometry', format: '0.00', round: 'down', width: 18,
  meaning: 'Largest rotation, without noise, for which every point stays in its own decision region.',
  formula: 'smallest angle at which a turned point meets a bisector of its region', source: 'Methods §1', tolerance: tolerances.closedForm,
  lines: v => [`every point stays in its own region up to ±${shown(v.largestRotationDeg, '0.00', 'down')}°`],
})

export const largestGain = partColumn('tolerances', 'largestGainDb', {
  id: 'largestGain', method: 'noiselessTolerances', title: 'Largest gain error', unit: 'dB', group: 'Geometry', format: '0.00', round: 'down', width: 19,
  meaning: 'Largest gain error up or down, without noise, for which every point stays in its own decision region.',
  formula: 'smaller of the two gain factors, in dB, at which a point meets a bisector of its region', source: 'Methods §1', tolerance: tolerances.closedForm,
  lines: v => [`every point stays in its own region up to ±${shown(v.largestGainDb, '0.00', 'down')} dB`],
})

const group = 'Labels, probabilities, decisions' as const

export const serMap = partColumn('map', 'serMap', {
  id: 'serMap', method: 'mapDecisions', title: 'SER at available, MAP', group, format: '0.00e-0', width: 23,
  meaning: 'Symbol error rate of MAP decisions at the available Es/N0, exact.',
  formula: 'boundary to j at dᵢⱼ/2 + (N0/(2·dᵢⱼ))·ln(pᵢ/pⱼ)', source: 'Methods §2', tolerance: tolerances.symbolError,
  lines: (v, row) => [`at the available Es/N0 of ${shown(row.availableEsN0Db)} dB: ${shown(v.serMap, '0.00e-0')}`,
    ...row.serExact === null ? [] : [`beside ${shown(row.serExact, '0.00e-0')} in the column SER at available, exact`]],
})

export const requiredMap = partColumn('map', 'requiredMapEsN0Db', {
  id: 'requiredMap', method: 'mapDecisions', title: 'Required Es/N0, MAP', unit: 'dB', group: 'Required SNR', format: '0.00', width: 22,
  meaning: 'Smallest Es/N0 above which the error rate of MAP decisions stays at or below the target.',
  formula: 'smallest Es/N0 with SER or BER of MAP decisions ≤ target', source: 'Methods §2, §3, §4', tolerance: tolerances.requiredDb,
  lines: (v, _row, _candidate, { requirements }) => {
    const rate = `${requirements?.target.quantity === 'ber' ? 'BER' : 'SER'} ≤ ${shown(requirements?.target.value, '0.00e-0')}`
    return [v.requiredMapEsN0Db === null ? `no Es/N0 is known for ${rate}; a BER needs labels` : `${rate} from ${shown(v.requiredMapEsN0Db)} dB`]
  },
})

export const mapOutside = partColumn('map', 'mapOutside', {
  id: 'mapOutside', method: 'mapDecisions', title: 'Points outside their cell, MAP', group, format: 'integer', width: 31,
  meaning: 'Points that MAP decisions at the available Es/N0 give to another point even without noise.',
  formula: 'number of i with a boundary behind sᵢ itself', source: 'Methods §2', tolerance: tolerances.count,
  lines: (v, row) => [`${shown(v.mapOutside, 'integer')} of ${shown(row.order, 'integer')} points at ${shown(row.availableEsN0Db)} dB`],
})

export const mapVanished = partColumn('map', 'mapVanished', {
  id: 'mapVanished', method: 'mapDecisions', title: 'Vanished cells, MAP', group, format: 'integer', width: 21,
  meaning: 'Points for which MAP decisions at the available Es/N0 never decide.',
  formula: 'number of empty cells of the power diagram', source: 'Methods §2', tolerance: tolerances.count,
  lines: (v, row) => [`${shown(v.mapVanished, 'integer')} of ${shown(row.order, 'integer')} cells at ${shown(row.availableEsN0Db)} dB`],
})
