import { factorFamilies } from '../schemas/candidates'
import type { CandidateInputs, Factor } from '../schemas/candidates'
import type { Entry } from './column'
import { parseNumber } from './entry'
import { parseRings, ringsText } from './entry-lists'
import { plain } from './format'

type Family = Factor['family']

/** How families of one order are written: 16-QAM, 8-PSK, 32-cross. */
const words: Partial<Record<Family, string>> = {
  'pam': 'PAM', 'psk': 'PSK', 'qam': 'QAM', 'cross-qam': 'cross', 'hexagonal': 'hexagonal', 'orthogonal': 'orthogonal',
  'biorthogonal': 'biorthogonal', 'simplex': 'simplex', 'hypercube': 'hypercube',
}
const short: Readonly<Record<string, Factor>> = { bpsk: { family: 'psk', order: 2 }, qpsk: { family: 'psk', order: 4 } }
const familyByWord = new Map(factorFamilies.flatMap((family): [string, Family][] => {
  const word = words[family]
  return word ? [[word.toLowerCase(), family]] : []
}))
const lattices = ['A2', 'D4', 'E8'] as const
const form = 'Enter factors as 16-QAM × 4-PAM, 4+12 at 2.57 × QPSK, or 24-D4 × 8-PSK.'

const factorText = (factor: Factor): string => {
  const { family, order, phasesDeg, lattice, offset } = factor
  if (family === 'apsk') {
    const phases = phasesDeg?.length ? ` phases ${phasesDeg.map(plain).join(', ')}` : ''
    return ringsText({ rings: factor.rings ?? null, ratios: factor.ratios ?? null }) + phases
  }
  if (family === 'lattice') return `${order}-${lattice}${offset?.length ? ` about ${offset.map(plain).join(', ')}` : ''}`
  return family === 'psk' && order === 4 ? 'QPSK' : family === 'psk' && order === 2 ? 'BPSK' : `${order}-${words[family]}`
}

/** Factors of a Cartesian product in one text: "16-QAM × 4-PAM". */
export const factorsText = (factors: CandidateInputs['factors']): string => factors?.map(factorText).join(' × ') ?? ''

const numbersOf = (text: string): number[] | null => {
  const numbers = text.split(/[\s;,]+/).filter(piece => piece !== '').map(parseNumber)
  return numbers.length === 0 || numbers.includes(null) ? null : numbers as number[]
}

function ringsFactor(text: string): Factor | string {
  const [before = '', after] = text.split(/\bphases\b/i)
  const entry = parseRings(before)
  if ('refused' in entry) return entry.refused
  const phasesDeg = after === undefined ? null : numbersOf(after)
  const { rings, ratios } = entry.change
  if (!rings || (after !== undefined && !phasesDeg)) return form
  return { family: 'apsk', rings, ...ratios ? { ratios } : {}, ...phasesDeg ? { phasesDeg } : {} }
}

function latticeFactor(lattice: string, order: number, about: string | undefined): Factor | string {
  const offset = about === undefined ? null : numbersOf(about)
  if (about !== undefined && !offset) return form
  return { family: 'lattice', lattice: lattices.find(id => id.toLowerCase() === lattice.toLowerCase())!, order, ...offset ? { offset } : {} }
}

/** One factor, or the sentence against it. */
function parseFactor(text: string): Factor | string {
  const known = short[text.toLowerCase()]
  if (known) return known
  if (/^\d+\s*\+/.test(text)) return ringsFactor(text)
  const [, first, order, last] = /^([a-z][a-z\s]*?)?[\s-]*(\d+)(?:[\s-]+([a-z]\w*.*))?$/i.exec(text) ?? []
  const latticeForm = /^(A2|D4|E8)(?:\s+about\s+(.+))?$/i.exec(last ?? '')
  if (latticeForm && !first) return latticeFactor(latticeForm[1]!, Number(order), latticeForm[2])
  const word = (first ?? last ?? '').trim().toLowerCase().replace(/^cross[\s-]qam$/, 'cross')
  const family = (first === undefined) === (last === undefined) ? undefined : familyByWord.get(word)
  if (family) return { family, order: Number(order) }
  return text === '' ? form : `“${text}” is no factor. ${form}`
}

/** Reads factors set apart by ×, or by an x or * between spaces. Whether they fit together is for the family's rules to say. */
export function parseFactors(text: string): Entry {
  if (text.trim() === '') return { change: { factors: null } }
  const read = text.trim().split(/\s*×\s*|\s+[x*]\s+/i).map(piece => parseFactor(piece.trim()))
  const refused = read.find(piece => typeof piece === 'string')
  return refused === undefined ? { change: { factors: read as Factor[] } } : { refused: refused as string }
}
