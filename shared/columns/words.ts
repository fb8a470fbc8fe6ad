import { families } from '../modulation/families'
import {
  backOffs, bases, channels, decisions, labellings, lattices, normalisations, probabilityRules, rateKinds, roles,
} from '../schemas/candidates'

export type Choice = { value: string, title: string }

const titled = <T extends string>(values: readonly T[], titles: Record<T, string>): Choice[] =>
  values.map(value => ({ value, title: titles[value] }))

export const familyChoices: readonly Choice[] = [
  ...families.map(family => ({ value: family.id, title: family.title })),
  { value: 'entered', title: 'entered' },
]
export const normalisationChoices = titled(normalisations, { meanEnergy: 'mean energy', peakEnergy: 'peak energy', minimumDistance: 'minimum distance' })
export const basisChoices = titled(bases, { uncoded: 'uncoded', rateThreshold: 'rate threshold', entered: 'entered' })
export const backOffChoices = titled(backOffs, { simulated: 'simulated', entered: 'entered', papr: 'PAPR alone' })
export const roleChoices = titled(roles, { reference: 'reference', chosen: 'chosen', fallback: 'fallback', rejected: 'rejected' })
export const labellingChoices = titled(labellings, { family: 'of the family', natural: 'natural binary', own: 'own' })
export const probabilityChoices = titled(probabilityRules, { equal: 'equal', shaped: 'shaped', own: 'own' })
export const decisionChoices = titled(decisions, { minimumDistance: 'minimum distance', map: 'MAP' })
export const rateKindChoices = titled(rateKinds, { bitMetricRate: 'bit-metric rate', mutualInformation: 'mutual information' })
export const channelChoices = titled(channels, { awgn: 'AWGN', rayleigh: 'Rayleigh', rician: 'Rician', nakagami: 'Nakagami' })
export const latticeChoices = titled(lattices, { A2: 'A2', D4: 'D4', E8: 'E8' })
