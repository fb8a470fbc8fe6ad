import { tolerances } from '../methods/tolerances'
import type { ColumnContext } from './column'
import { numberInput, shown, valueColumn } from './make'

const group = 'Rate and bandwidth' as const
const source = 'Methods §7'
const tolerance = tolerances.closedForm

const overhead = ({ requirements }: ColumnContext) => shown(requirements?.overhead, 'plain')
const interval = ({ requirements }: ColumnContext) => shown(requirements?.dimensionsPerInterval, 'integer')

export const spectralEfficiency = valueColumn('spectralEfficiency', '0.00', {
  id: 'spectralEfficiency', method: 'bandwidth', title: 'η', unit: 'bit/s/Hz', group, firstOpening: true, width: 13,
  meaning: 'Spectral efficiency: net bit rate over occupied bandwidth.',
  formula: 'η = net rate / B', source, tolerance,
  lines: v => [`${shown(v.netBitRate / 1e6, '0.000')} Mbit/s / ${shown(v.occupiedBandwidthHz / 1e6, '0.000')} MHz = ${shown(v.spectralEfficiency, '0.000')} bit/s/Hz`],
})

export const netRate = valueColumn('netBitRate', '0.0', {
  id: 'netRate', method: 'bandwidth', title: 'Net rate', unit: 'Mbit/s', group, firstOpening: true, width: 17,
  meaning: 'Net bit rate after the study\'s overhead.',
  formula: 'net rate = R·Rs·(1 − overhead)', source, tolerance,
  lines: (v, _row, context) => [`${shown(v.netBits, '0.000')} · ${shown(v.symbolRateHz / 1e6, '0.000')} Msymbol/s · (1 − ${overhead(context)}) = ${shown(v.netBitRate / 1e6, '0.000')} Mbit/s`],
}, 1e6)

export const symbolRate = valueColumn('symbolRateHz', '0.000', {
  id: 'symbolRate', method: 'bandwidth', title: 'Symbol rate Rs', unit: 'Msymbol/s', group, width: 26,
  meaning: 'Symbols per second, held constant or following from what is.',
  formula: 'Rs held constant; or B·D/(N·(1+α)); or net rate/(R·(1 − overhead))', source, tolerance,
  lines: v => [`Rs = ${shown(v.symbolRateHz / 1e6, 'plain')} Msymbol/s`],
}, 1e6)

export const occupiedBandwidth = valueColumn('occupiedBandwidthHz', '0.00', {
  id: 'occupiedBandwidth', method: 'bandwidth', title: 'Occupied bandwidth B', unit: 'MHz', group, width: 26,
  meaning: 'Bandwidth that the shaped signal occupies.',
  formula: 'B = Rs·N·(1+α)/D', source, tolerance,
  lines: (v, _row, context) => [`${shown(v.symbolRateHz / 1e6, '0.000')} Msymbol/s · ${shown(v.dimensions, 'integer')} · (1 + ${shown(v.rollOff, 'plain')}) / ${interval(context)} = ${shown(v.occupiedBandwidthHz / 1e6, '0.000')} MHz`],
}, 1e6)

export const netBits = valueColumn('netBits', '0.000', {
  id: 'netBits', method: 'netBits', title: 'Net bits R', unit: 'bit/symbol', group, width: 22,
  meaning: 'Net bits per symbol: what energy per bit, rates and gaps use.',
  formula: 'R = H − (1−r)·k, which is r·k for equal probabilities', source: 'Methods §0; Böcherer 2015', tolerance,
  lines: (v, { inputs }) => [
    `r = ${shown(inputs.codeRate, 'fraction')}, k = ${shown(v.bitsPerSymbol, '0.000')}: R = ${shown(v.netBits, '0.000')} bit/symbol`,
    ...inputs.probabilityRule === 'equal' || v.bitsPerSymbol === null ? [] : [`of probabilities with the entropy H = ${shown(v.netBits + (1 - inputs.codeRate) * v.bitsPerSymbol, '0.000')} bit/symbol`],
  ],
})

export const bitsPerSymbol = valueColumn('bitsPerSymbol', '0.000', {
  id: 'bitsPerSymbol', method: 'netBits', title: 'Bits per symbol k', group, width: 18,
  meaning: 'Logarithm of the order to base two.',
  formula: 'k = log2 M', source: 'Methods §0', tolerance,
  lines: v => [`log2 ${shown(v.order, 'integer')} = ${shown(v.bitsPerSymbol, '0.000')}`],
})

export const rollOff = numberInput('rollOff', {
  id: 'rollOff', title: 'Roll-off α', group, meaning: 'Roll-off of the root-raised-cosine pulse; left empty: the study\'s.',
}, { width: 12 })
