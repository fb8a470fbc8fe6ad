import { formatNumber } from '../columns/format'
import { defaultInputs } from '../schemas/candidates'
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
  'orthogonal': ({ order }) => `orthogonal ${order ?? ''}`,
  'biorthogonal': ({ order }) => `biorthogonal ${order ?? ''}`,
  'simplex': ({ order }) => `simplex ${order ?? ''}`,
  'hypercube': ({ order }) => `hypercube ${order ?? ''}`,
  'lattice': ({ lattice, order }) => `${lattice ?? 'lattice'} ${order ?? ''}`,
  'product': ({ factors }) => (factors ?? []).map(factor => baseName({ ...defaultInputs, order: null, ...factor })).join(' × ') || 'product',
  'entered': ({ enteredSource }) => enteredSource.trim() || 'entered scheme',
}

function baseName(inputs: CandidateInputs): string {
  const own = named[inputs.family]
  return (own ? own(inputs) : familyOfRow(inputs)!.signature(familyParameters(inputs))).trim()
}

/**
 * Name of a row that was given none: "16-QAM", "8-PSK", "4+12 at 2.57", "hexagonal 16", "cross 32", "D4 24", "4-PAM × QPSK";
 * with its code rate and its entropy where a code or shaping is counted: "64-QAM r 3/4 H 5.2".
 */
export function describeCandidate(inputs: CandidateInputs): string {
  const { family, basis, codeRate, probabilityRule, shapedEntropy } = inputs
  const coded = family !== 'entered' && basis === 'rateThreshold' && codeRate < 1 ? ` r ${formatNumber(codeRate, 'fraction')}` : ''
  const shaped = family !== 'entered' && probabilityRule === 'shaped' && shapedEntropy !== null ? ` H ${Number(shapedEntropy.toFixed(4))}` : ''
  return `${baseName(inputs)}${coded}${shaped}`.slice(0, 120)
}
