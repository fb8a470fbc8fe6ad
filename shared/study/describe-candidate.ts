import type { CandidateInputs } from '../schemas/candidates'
import { familyOfRow, familyParameters } from './family-parameters'

/** A ring ratio with two to four decimals: 2.57, 2.20, 2.125. */
const ratio = (value: number) => {
  const [whole, decimals = ''] = value.toFixed(4).split('.')
  return `${whole}.${decimals.replace(/0{1,2}$/, '')}`
}

const named: Partial<Record<string, (inputs: CandidateInputs) => string>> = {
  'apsk': ({ rings, ratios }) => `${(rings ?? []).join('+') || 'APSK'}${ratios?.length ? ` at ${ratios.map(ratio).join(', ')}` : ''}`,
  'hexagonal': ({ order }) => `hexagonal ${order ?? ''}`,
  'cross-qam': ({ order }) => `cross ${order ?? ''}`,
  'custom': ({ points }) => `custom ${points?.length ?? ''}`,
  'entered': ({ enteredSource }) => enteredSource.trim() || 'entered scheme',
}

/** Name of a row that was given none: "16-QAM", "8-PSK", "4+12 at 2.57", "hexagonal 16", "cross 32". */
export function describeCandidate(inputs: CandidateInputs): string {
  const own = named[inputs.family]
  const family = familyOfRow(inputs)
  const text = own ? own(inputs) : family!.signature(familyParameters(inputs))
  return text.trim().slice(0, 120)
}
