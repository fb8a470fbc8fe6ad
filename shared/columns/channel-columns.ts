import type { CandidateInputs } from '../schemas/candidates'
import { choiceInput, numberInput, unusedByEntered } from './make'
import { channelChoices } from './words'

const group = 'Channel and imperfections' as const

const entered = unusedByEntered('channel of the model')
const onlyWith = (holds: (inputs: CandidateInputs) => boolean, sentence: string) => (inputs: CandidateInputs) =>
  entered(inputs) ?? (holds(inputs) ? null : sentence)

export const channel = choiceInput('channel', channelChoices, {
  id: 'channel', title: 'Channel', group,
  meaning: 'White noise alone, or fading before it: Rayleigh, Rician or Nakagami. SNR then is the mean of a branch.',
}, { width: 13, unused: entered })

export const ricianK = numberInput('ricianKDb', {
  id: 'ricianKDb', title: 'Rician K', unit: 'dB', group, meaning: 'Rician fading: power of the direct over that of the scattered part.',
}, { width: 13, unused: onlyWith(inputs => inputs.channel === 'rician', 'Used on the Rician channel only.') })

export const nakagamiM = numberInput('nakagamiM', {
  id: 'nakagamiM', title: 'Nakagami m', group, meaning: 'Nakagami fading: its parameter; 1 is Rayleigh fading, larger fades less.',
}, { width: 12, unused: onlyWith(inputs => inputs.channel === 'nakagami', 'Used on the Nakagami channel only.') })

export const branches = numberInput('branches', {
  id: 'branches', title: 'Branches L', group, meaning: 'Fading: independent like branches of the maximal-ratio combiner.',
}, { width: 12, format: 'integer', unused: onlyWith(inputs => inputs.channel !== 'awgn', 'Used on fading channels only.') })

export const phaseError = numberInput('phaseErrorDeg', {
  id: 'phaseErrorDeg', title: 'Carrier phase error, r.m.s.', unit: '°', group, meaning: 'Normal carrier phase error that the decisions do not know of; 0: none.',
}, { width: 14, unused: entered })

export const frameSymbols = numberInput('frameSymbols', {
  id: 'frameSymbols', title: 'Frame length', unit: 'symbols', group, meaning: 'Symbols of a frame, for its error rate without a code.',
}, { width: 14, format: 'integer', unused: entered })
