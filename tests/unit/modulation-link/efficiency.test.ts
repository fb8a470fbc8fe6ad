import { describe, expect, it } from 'vitest'
import {
  capacity, distanceN0Db, ebN0Db, epkN0Db, esN0ForCapacity, evmPercentAt, gapToCapacityDb, netBitsPerSymbol, ratesOf,
} from '../../../shared/modulation/efficiency'

const demonstration = { netBits: 4, dimensions: 2, rollOff: 0.25, overhead: 0.05, dimensionsPerInterval: 2 }

describe('net bits per symbol', () => {
  it('are k when uncoded', () => expect(netBitsPerSymbol(4, 4, 1)).toBe(4))
  it('are r·k for equal probabilities', () => expect(netBitsPerSymbol(6, 6, 0.75)).toBe(4.5))
  it('lose the redundancy of all k bits when shaped', () => expect(netBitsPerSymbol(3.5, 4, 0.75)).toBe(2.5))
  it('are refused when the code takes all of the entropy', () => {
    expect(() => netBitsPerSymbol(1, 4, 0.75)).toThrow('leaves no net bits')
  })
  it('are refused for a code rate above 1', () => expect(() => netBitsPerSymbol(4, 4, 1.01)).toThrow('above 0 and up to 1'))
})

describe('capacity', () => {
  it('of two dimensions at Es/N0 = 15 is 4 bit', () => expect(capacity(2, 15)).toBeCloseTo(4, 14))
  it('of one dimension at Es/N0 = 1.5 is 1 bit', () => expect(capacity(1, 1.5)).toBeCloseTo(1, 14))
  it('keeps its relative accuracy at 1e-14', () => expect(capacity(2, 1e-14) / (1e-14 / Math.LN2)).toBeCloseTo(1, 12))
  it('is inverted for two dimensions', () => expect(esN0ForCapacity(4, 2)).toBeCloseTo(15, 12))
  it('is inverted for eight dimensions', () => expect(esN0ForCapacity(capacity(8, 12.5), 8)).toBeCloseTo(12.5, 12))
  it('leaves 16-QAM at 20.92 dB a gap of 9.16 dB', () => expect(gapToCapacityDb(20.92, 4, 2)).toBeCloseTo(9.159, 3))
})

describe('SNR axes', () => {
  it('Eb/N0 of 4 bit is 6.02 dB below Es/N0', () => expect(ebN0Db(20.92, 4)).toBeCloseTo(14.8994, 4))
  it('Epk/N0 adds the PAPR', () => expect(epkN0Db(20, 2.55)).toBeCloseTo(22.55, 12))
  it('d_min²/(2·N0) of QPSK equals Es/N0', () => expect(distanceN0Db(12, Math.SQRT2)).toBeCloseTo(12, 12))
  it('d_min²/(2·N0) of binary PSK is 3.01 dB above', () => expect(distanceN0Db(12, 2)).toBeCloseTo(15.0103, 4))
  it('EVM at 20 dB is 10 % in two dimensions', () => expect(evmPercentAt(20, 2)).toBeCloseTo(10, 12))
  it('EVM at 20 dB is 7.07 % in one dimension', () => expect(evmPercentAt(20, 1)).toBeCloseTo(7.0711, 4))
})

describe('rates', () => {
  const held = (heldConstant: 'symbolRate' | 'occupiedBandwidth' | 'netBitRate', value: number) => ratesOf({ heldConstant, value }, demonstration)
  it('5.6 Msymbol/s at roll-off 0.25 occupy 7 MHz', () => expect(held('symbolRate', 5.6e6).occupiedBandwidthHz).toBe(7e6))
  it('5.6 Msymbol/s of 4 bit with 5 % overhead carry 21.28 Mbit/s', () => expect(held('symbolRate', 5.6e6).netBitRateBps).toBeCloseTo(21.28e6, 3))
  it('efficiency is net rate over bandwidth', () => expect(held('symbolRate', 5.6e6).spectralEfficiency).toBeCloseTo(3.04, 12))
  it('7 MHz held constant allow 5.6 Msymbol/s', () => expect(held('occupiedBandwidth', 7e6).symbolRateHz).toBe(5.6e6))
  it('a held bandwidth comes back exactly', () => expect(held('occupiedBandwidth', 6.9e6).occupiedBandwidthHz).toBe(6.9e6))
  it('20 Mbit/s held constant need 5.263 Msymbol/s', () => expect(held('netBitRate', 20e6).symbolRateHz).toBeCloseTo(5263157.8947, 3))
  it('a held net rate comes back exactly', () => expect(held('netBitRate', 20e6).netBitRateBps).toBe(20e6))
  it('four dimensions on one carrier take two intervals', () => {
    const rates = ratesOf({ heldConstant: 'symbolRate', value: 1e6 }, { ...demonstration, dimensions: 4 })
    expect(rates.occupiedBandwidthHz).toBe(2.5e6)
  })
  it('two polarisations halve the bandwidth of four dimensions', () => {
    const rates = ratesOf({ heldConstant: 'symbolRate', value: 1e6 }, { ...demonstration, dimensions: 4, dimensionsPerInterval: 4 })
    expect(rates.occupiedBandwidthHz).toBe(1.25e6)
  })
  it('one dimension on a baseband line takes half of Rs·(1+α)', () => {
    const rates = ratesOf({ heldConstant: 'symbolRate', value: 1e6 }, { ...demonstration, dimensions: 1 })
    expect(rates.occupiedBandwidthHz).toBe(0.625e6)
  })
  it('a held value of zero is refused', () => expect(() => held('symbolRate', 0)).toThrow('number above 0'))
  it('an overhead of 1 is refused', () => {
    expect(() => ratesOf({ heldConstant: 'symbolRate', value: 1 }, { ...demonstration, overhead: 1 })).toThrow('from 0 to below 1')
  })
})
