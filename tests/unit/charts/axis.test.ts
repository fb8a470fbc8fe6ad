import { describe, expect, it } from 'vitest'
import { snrShiftDb } from '../../../app/utils/charts/snr-axis'
import { decadeTicks, linearTicks, powerOfTen, scientificText } from '../../../app/utils/charts/ticks'

describe('SNR axes', () => {
  // 16-QAM at Es = 1: 4 bits, Epk = 1.8, d_min = 2/√10
  const values = { netBits: 4, paprDb: 2.5527250510330606, minimumDistance: 0.6324555320336759 }
  it('leave Es/N0 as it is', () => expect(snrShiftDb('esN0', values)).toBe(0))
  it('put Eb/N0 of 4 bits 6.0206 dB lower', () => expect(snrShiftDb('ebN0', values)).toBeCloseTo(-6.020599913279624, 12))
  it('put Epk/N0 higher by the PAPR', () => expect(snrShiftDb('epkN0', values)).toBe(2.5527250510330606))
  it('put d_min²/(2·N0) of 16-QAM 6.9897 dB lower', () => expect(snrShiftDb('distance', values)).toBeCloseTo(-6.989700043360188, 12))
  it('have no place for a row without points', () => {
    expect(snrShiftDb('epkN0', { netBits: 2, paprDb: null, minimumDistance: null })).toBeNull()
    expect(snrShiftDb('distance', { netBits: 2, paprDb: null, minimumDistance: null })).toBeNull()
  })
  it('have no Eb/N0 for a row that carries nothing', () => expect(snrShiftDb('ebN0', { ...values, netBits: 0 })).toBeNull())
})

describe('tick labels', () => {
  it('write powers of ten with superscripts', () => expect([0, -6, -12, 3].map(powerOfTen)).toEqual(['10⁰', '10⁻⁶', '10⁻¹²', '10³']))
  it('write a target as multiple and power', () => {
    expect([1e-6, 2.5e-7, 0.05, 0.5, 1].map(scientificText)).toEqual(['10⁻⁶', '2.5·10⁻⁷', '5·10⁻²', '5·10⁻¹', '1'])
  })
  it('label every decade where there is room', () => {
    expect(decadeTicks(-9, 0, 300).filter(tick => tick.label).map(tick => tick.label))
      .toEqual(['10⁻⁹', '10⁻⁸', '10⁻⁷', '10⁻⁶', '10⁻⁵', '10⁻⁴', '10⁻³', '10⁻²', '10⁻¹', '10⁰'])
  })
  it('leave decades out where there is none', () => {
    expect(decadeTicks(-30, 0, 300).filter(tick => tick.label).map(tick => tick.at)).toEqual([-30, -27, -24, -21, -18, -15, -12, -9, -6, -3, 0])
  })
  it('label 2 and 5 between decades that are far apart', () => {
    expect(decadeTicks(-6, -5, 300).filter(tick => tick.label).map(tick => tick.label)).toEqual(['10⁻⁶', '2·10⁻⁶', '5·10⁻⁶', '10⁻⁵'])
  })
  it('use a true minus sign and the step\'s decimals', () => {
    expect(linearTicks(-1, 1, 240).map(tick => tick.label)).toEqual(['−1.0', '−0.5', '0.0', '0.5', '1.0'])
  })
})
