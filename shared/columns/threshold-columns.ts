import type { CandidateInputs } from '../schemas/candidates'
import { choiceInput, numberInput, textInput } from './make'
import { rateKindChoices } from './words'

const group = 'Required SNR' as const
const unused = ({ basis }: CandidateInputs) => basis === 'rateThreshold' ? null : 'Used where the basis is a rate threshold only.'

export const rateKind = choiceInput('rateKind', rateKindChoices, {
  id: 'rateKind', title: 'Rate threshold of', group,
  meaning: 'Which rate has to reach the net bits per symbol: the bit-metric rate of the labels, or the mutual information.',
}, { width: 20, unused })

export const decoderGap = numberInput('decoderGapDb', {
  id: 'decoderGapDb', title: 'Decoder gap', unit: 'dB', group, meaning: 'How far above the rate threshold the decoder meets the target; 0 is an ideal code.',
}, { width: 14, unused })

export const decoderGapSource = textInput('decoderGapSource', {
  id: 'decoderGapSource', title: 'Source of the decoder gap', group, meaning: 'Where the decoder gap comes from.',
}, { unused })
