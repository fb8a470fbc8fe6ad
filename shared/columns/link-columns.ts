import { tolerances } from '../methods/tolerances'
import { choiceInput, numberInput, shown, valueColumn } from './make'
import { backOffChoices } from './words'

const group = 'Amplifier and link' as const
const source = 'Methods §7'

export const papr = valueColumn('paprDb', '0.00', {
  id: 'papr', method: 'model', title: 'PAPR', unit: 'dB', group, firstOpening: true, width: 10,
  meaning: 'Peak energy of the constellation over its mean energy.',
  formula: 'PAPR = 10·log10(Epk/Es)', source: 'Methods §0', tolerance: tolerances.closedForm,
  lines: v => [`10·log10(${shown(v.peakEnergy, '0.000')}/${shown(v.meanEnergy, '0.000')}) = ${shown(v.paprDb)} dB`],
})

export const backOffValue = valueColumn('backOffDb', '0.00', {
  id: 'backOffValue', method: 'backOff', title: 'Back-off', unit: 'dB', group, firstOpening: true, width: 12,
  meaning: 'How far below saturation the amplifier runs for this row.',
  formula: 'entered; or the peak factor of the shaped waveform at the exceedance probability; or the constellation\'s PAPR alone',
  source: 'Methods §6', tolerance: tolerances.backOff,
  lines: (v, row) => [
    ...row.inputs.backOff === 'simulated'
      ? [`root-raised-cosine pulse, roll-off ${shown(v.rollOff, 'plain')}, exceeded with probability ${shown(row.inputs.backOffExceedance, 'plain')}: ${shown(v.backOffDb)} dB`,
          `standard error of the seeded simulation: ${shown(v.backOffErrorDb, '0.000')} dB`]
      : row.inputs.backOff === 'entered' ? [`entered: ${shown(v.backOffDb)} dB`] : [`the constellation's PAPR alone: ${shown(v.paprDb)} dB`],
  ],
})

export const availableEsN0 = valueColumn('availableEsN0Db', '0.00', {
  id: 'availableEsN0', method: 'linkBudget', title: 'Available Es/N0', unit: 'dB', group, round: 'down', firstOpening: true, width: 20,
  meaning: 'What the link delivers to this row in the deciding case, after its back-off and at its symbol rate.',
  formula: 'available = C/N0 − back-off − 10·log10 Rs (the back-off counts where peak power is the limit); or as entered; or from N0 in signal units',
  source, tolerance: tolerances.linkDb,
  lines: (v, _row, { requirements }) => [
    requirements?.limitedBy === 'peakPower' ? `peak power is the limit: ${shown(v.backOffDb)} dB of back-off are taken off` : 'mean power is the limit: no back-off is taken off',
    `Rs = ${shown(v.symbolRateHz / 1e6, '0.000')} Msymbol/s`,
    ...v.cases.map(c => `case ${c.name}: ${shown(c.availableEsN0Db, '0.00', 'down')} dB`),
  ],
})

export const availableEbN0 = valueColumn('availableEbN0Db', '0.00', {
  id: 'availableEbN0', method: 'snrAxes', title: 'Available Eb/N0', unit: 'dB', group, round: 'down', width: 20,
  meaning: 'Available SNR per net bit.',
  formula: 'Eb/N0 = Es/N0 − 10·log10 R', source: 'Methods §0', tolerance: tolerances.linkDb,
  lines: v => [`${shown(v.availableEsN0Db)} dB − 10·log10 ${shown(v.netBits, '0.000')} = ${shown(v.availableEbN0Db, '0.00', 'down')} dB`],
})

export const receiverThreshold = valueColumn('receiverThresholdDbm', '0.0', {
  id: 'receiverThreshold', method: 'linkBudget', title: 'Receiver threshold', unit: 'dBm', group, round: 'up', firstOpening: true, width: 24,
  meaning: 'Received level at which the target is just met.',
  formula: 'N0 + 10·log10 Rs + required Es/N0 + implementation loss', source, tolerance: tolerances.requiredDb,
  lines: v => [`Rs = ${shown(v.symbolRateHz / 1e6, '0.000')} Msymbol/s: 10·log10 Rs = ${shown(10 * Math.log10(v.symbolRateHz))} dBHz`,
    `N0 + ${shown(10 * Math.log10(v.symbolRateHz))} + ${shown(v.requiredEsN0Db)} + ${shown(v.implementationLossDb)} = ${shown(v.receiverThresholdDbm)} dBm`],
})

export const backOff = choiceInput('backOff', backOffChoices, {
  id: 'backOff', title: 'Back-off from', group, meaning: 'Where the back-off comes from: simulated, entered, or the constellation\'s PAPR alone.',
}, { width: 15 })

export const backOffDb = numberInput('backOffDb', {
  id: 'backOffDb', title: 'Entered back-off', unit: 'dB', group, meaning: 'Back-off given by you, where it is entered.',
}, { width: 20, unused: inputs => inputs.backOff === 'entered' ? null : 'Used where the back-off is entered only.' })

export const exceedance = numberInput('backOffExceedance', {
  id: 'backOffExceedance', title: 'Exceedance', group, meaning: 'Probability with which the simulated back-off may be exceeded.',
}, { width: 13, unused: inputs => inputs.backOff === 'simulated' ? null : 'Used where the back-off is simulated only.' })

export const backOffError = valueColumn('backOffErrorDb', '0.000', {
  id: 'backOffError', method: 'backOff', title: 'Back-off, standard error', unit: 'dB', group, width: 28,
  meaning: 'Standard error of the simulated back-off.',
  formula: 'from the spread of the seeded runs', source: 'Methods §6', tolerance: tolerances.simulated,
  lines: v => [`${shown(v.backOffErrorDb, '0.000')} dB`],
})

export const implementationLoss = numberInput('implementationLossDb', {
  id: 'implementationLossDb', title: 'Implementation loss', unit: 'dB', group, meaning: 'The row\'s own implementation loss; left empty: the study\'s.',
}, { width: 24 })
