import { describe, expect, it } from 'vitest'
import { verdict } from '../../../shared/modulation/verdict'
import type { VerdictKind, VerdictLimit, VerdictValues } from '../../../shared/modulation/verdict'

const row: VerdictValues = { margin: 1.52, netBitRate: 21.28, occupiedBandwidth: 7, spectralEfficiency: 3.04, papr: 1.49 }
const must = (id: string, kind: VerdictKind, value: number): VerdictLimit => ({ id, kind, value, reason: '' })
const text = (values: Partial<VerdictValues>, ...limits: VerdictLimit[]) => verdict({ ...row, ...values }, limits).text

describe('verdict in words', () => {
  it('passes without must-haves', () => expect(text({})).toBe('passes'))
  it('passes when every must-have holds', () => expect(text({}, must('R1', 'margin', 1), must('R2', 'netBitRate', 20))).toBe('passes'))
  it('says which must-have fails and by how much', () => {
    expect(text({ netBitRate: 15.96 }, must('R2', 'netBitRate', 20))).toBe('fails R2: net bit rate 4.1 Mbit/s short at 16.0 Mbit/s')
  })
  it('shows a rate with more digits where the nearest decimal would meet the limit', () => {
    expect(text({ netBitRate: 19.98 }, must('R2', 'netBitRate', 20))).toBe('fails R2: net bit rate 0.02 Mbit/s short at 19.98 Mbit/s')
  })
  it('does so for a limit between two decimals', () => {
    expect(text({ netBitRate: 19.93 }, must('R2', 'netBitRate', 19.96))).toBe('fails R2: net bit rate 0.03 Mbit/s short at 19.93 Mbit/s')
  })
  it('shows 16-QAM of the demonstration short by 0.14 dB', () => {
    expect(text({ margin: 0.8612 }, must('R1', 'margin', 1))).toBe('fails R1: margin 0.14 dB short at +0.86 dB')
  })
  it('shows a negative margin with its sign', () => {
    expect(text({ margin: -1.7585 }, must('R1', 'margin', 1))).toBe('fails R1: margin 2.76 dB short at −1.76 dB')
  })
  it('names every must-have that fails', () => {
    expect(text({ margin: 0.5, occupiedBandwidth: 7.5 }, must('R1', 'margin', 1), must('R3', 'occupiedBandwidth', 7), must('R4', 'papr', 3)))
      .toBe('fails R1: margin 0.50 dB short at +0.50 dB; R3: occupied bandwidth 0.50 MHz over at 7.50 MHz')
  })
  it('never shows a shortfall as nothing', () => {
    expect(text({ margin: 0.9999999 }, must('R1', 'margin', 1))).toBe('fails R1: margin 0.01 dB short at +0.99 dB')
  })
  it('never shows an excess as nothing', () => {
    expect(text({ papr: 3.0000001 }, must('R5', 'papr', 3))).toBe('fails R5: PAPR 0.0000001 dB over at 3.0000001 dB')
  })
  it('says when the row has no such number', () => expect(text({ papr: null }, must('R5', 'papr', 3))).toBe('fails R5: PAPR is not known for this row'))
  it('names the deciding case beside the margin', () => {
    expect(text({ margin: 0.5, decidingCase: 'faded' }, must('R1', 'margin', 1))).toBe('fails R1: margin 0.50 dB short at +0.50 dB (faded)')
  })
})

describe('checks', () => {
  const only = (values: Partial<VerdictValues>, limit: VerdictLimit) => verdict({ ...row, ...values }, [limit]).checks[0]!
  it('hold exactly at the limit', () => expect(only({ occupiedBandwidth: 7 }, must('R3', 'occupiedBandwidth', 7)).passes).toBe(true))
  it('hold at the limit but for a rounding error', () => expect(only({ margin: 0.7 - 0.4 }, must('R1', 'margin', 0.3)).passes).toBe(true))
  it('fail on unrounded numbers', () => expect(only({ margin: 0.9999 }, must('R1', 'margin', 1)).passes).toBe(false))
  it('say by how much they hold', () => expect(only({}, must('R4', 'spectralEfficiency', 3)).by).toBeCloseTo(0.04, 12))
  it('say by how much they fail, negative', () => expect(only({ occupiedBandwidth: 8 }, must('R3', 'occupiedBandwidth', 7)).by).toBe(-1))
  it('use the deciding case\'s own required margin', () => expect(only({ margin: 1.2, requiredMargin: 1.5 }, must('R1', 'margin', 1)).passes).toBe(false))
  it('word what is to spare', () => expect(only({}, must('R1', 'margin', 1)).sentence).toBe('margin 0.52 dB to spare at +1.52 dB'))
  it('round down what is to spare', () =>
    expect(only({}, must('R2', 'netBitRate', 20)).sentence).toBe('net bit rate 1.2 Mbit/s to spare at 21.3 Mbit/s'))
  it('round up what is over', () =>
    expect(only({ occupiedBandwidth: 7.011 }, must('R3', 'occupiedBandwidth', 7)).sentence).toBe('occupied bandwidth 0.02 MHz over at 7.01 MHz'))
  it('keep the order of the must-haves', () => {
    expect(verdict(row, [must('B', 'papr', 3), must('A', 'margin', 1)]).checks.map(check => check.id)).toEqual(['B', 'A'])
  })
})
