import { asymptoticEfficiencyDb, evmPercentAt, largestGainDb, largestRotationRad } from '../../modulation'
import type { FamilyId } from '../../modulation'
import type { Check } from './check'
import { energyAtUnitDistance, geometryOf } from './tools'

const efficiency = (id: FamilyId, order: number, name: string, published: string): Check => ({
  method: 'powerEfficiency', what: `${name} against antipodal points`, unit: 'dB', published, source: 'agrellKarlsson', memory: true,
  compute: () => {
    const geometry = geometryOf(id, { order })
    return asymptoticEfficiencyDb(geometry.constellation, geometry.minimumDistance)
  },
})

const advantage = (order: number, published: string): Check => ({
  method: 'distances', what: `SNR advantage of QAM over PSK, ${order} points`, unit: 'dB', published, source: 'proakis', place: '4th ed., table 5.2-1', memory: true,
  compute: () => 20 * Math.log10(geometryOf('qam', { order }).minimumDistance / geometryOf('psk', { order }).minimumDistance),
})

const rotation = (id: FamilyId, order: number, name: string, published: string): Check => ({
  method: 'noiselessTolerances', what: `largest rotation of ${name}`, unit: '°', published, source: 'commonPractice', compute: () => largestRotationRad(geometryOf(id, { order })) * 180 / Math.PI,
})
const gain = (order: number, published: string): Check => ({
  method: 'noiselessTolerances', what: `largest gain error of ${order}-QAM, its outer points falling short`, unit: 'dB', published, source: 'commonPractice',
  compute: () => largestGainDb(geometryOf('qam', { order })),
})

/** Distances, neighbours, efficiencies. */
export const geometryChecks: readonly Check[] = [
  advantage(16, '4.20'), advantage(64, '9.95'),
  { method: 'distances', what: '8-PSK: Δ0 = 2·sin(π/8)', published: '0.765', source: 'ungerboeck', compute: () => geometryOf('psk', { order: 8 }).minimumDistance },
  { method: 'distances', what: 'its subsets, 4-PSK: Δ1 = √2', published: '1.414', source: 'ungerboeck', compute: () => geometryOf('psk', { order: 4 }).minimumDistance },
  { method: 'distances', what: 'kissing number of A2, inside 64 hexagonal points', published: '6', within: 0, source: 'conwaySloane', compute: () => Math.max(...geometryOf('hexagonal', { order: 64 }).nearestCounts) },
  { method: 'distances', what: 'kissing number of Z2, inside 64-QAM', published: '4', within: 0, source: 'conwaySloane', compute: () => Math.max(...geometryOf('qam', { order: 64 }).nearestCounts) },
  { method: 'distances', what: '4096-QAM: mean nearest neighbours 4 − 4/√M', published: '3.9375', within: 1e-12, source: 'forneyUngerboeck', compute: () => geometryOf('qam', { order: 4096 }).nearestMean },
  {
    method: 'distances', what: 'hexagonal over square, 1024 points: 2/√3 and a round boundary’s π/3', unit: 'dB', published: () => 10 * Math.log10(2 / Math.sqrt(3) * Math.PI / 3),
    within: 0.01, source: 'forneyWei', compute: () => 10 * Math.log10(energyAtUnitDistance('qam', 1024) / energyAtUnitDistance('hexagonal', 1024)),
  },
  { method: 'relevantNeighbours', what: '256-QAM: mean relevant neighbours 4 − 4/√M', published: '3.75', within: 0, source: 'deBerg', compute: () => geometryOf('qam', { order: 256 }).relevantMean },
  { method: 'relevantNeighbours', what: 'PSK: two neighbours each, 32 points', published: '2', within: 0, source: 'commonPractice', compute: () => geometryOf('psk', { order: 32 }).relevantMean },
  rotation('psk', 4, 'QPSK', '45.000000'), rotation('psk', 8, '8-PSK', '22.500000'), rotation('qam', 16, '16-QAM', '16.87'), gain(16, '3.52'), gain(64, '1.34'),
  efficiency('psk', 2, 'BPSK', '0.00'), efficiency('psk', 4, 'QPSK', '0.00'), efficiency('psk', 3, '3-PSK', '0.75'), efficiency('psk', 8, '8-PSK', '-3.57'),
  efficiency('qam', 16, '16-QAM', '-3.98'),
  { method: 'evm', what: 'EVM of 30 dB', unit: '%', published: '3.162', source: 'commonPractice', compute: () => evmPercentAt(30, 2) },
  { method: 'evm', what: 'EVM of 20 dB', unit: '%', published: '10', within: 1e-9, source: 'commonPractice', compute: () => evmPercentAt(20, 2) },
]
