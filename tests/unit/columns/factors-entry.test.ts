import { describe, expect, it } from 'vitest'
import { factorsText, parseFactors } from '../../../shared/columns/factors-entry'

describe('factors of a product', () => {
  it('are read as families with their orders', () => expect(parseFactors('16-QAM × 4-PAM')).toEqual({
    change: { factors: [{ family: 'qam', order: 16 }, { family: 'pam', order: 4 }] },
  }))
  it('may be set apart by an x, and name the family first', () => expect(parseFactors('pam 4 x QPSK')).toEqual({
    change: { factors: [{ family: 'pam', order: 4 }, { family: 'psk', order: 4 }] },
  }))
  it('may be rings', () => expect(parseFactors('4+12 at 2.57 × 8-PSK')).toEqual({
    change: { factors: [{ family: 'apsk', rings: [4, 12], ratios: [2.57] }, { family: 'psk', order: 8 }] },
  }))
  it('may be cuts of lattices about an offset', () => expect(parseFactors('24-D4 about 0.5, 0.5, 0.5, 0.5 × 32-cross')).toEqual({
    change: { factors: [{ family: 'lattice', lattice: 'D4', order: 24, offset: [0.5, 0.5, 0.5, 0.5] }, { family: 'cross-qam', order: 32 }] },
  }))
  it.each(['16-QAM × 4-PAM', 'QPSK × BPSK', '4+12 at 2.57 phases 45, 15 × 16-hexagonal', '24-D4 about 0.5, 0, 0, 0 × 32-cross'])('are shown as read: %s', (text) => {
    const entry = parseFactors(text)
    expect('change' in entry && factorsText(entry.change.factors ?? null)).toBe(text)
  })
  it('are cleared by nothing', () => expect(parseFactors(' ')).toEqual({ change: { factors: null } }))
  it('name what is no factor', () => expect(parseFactors('16-QAM × noise')).toEqual({
    refused: '“noise” is no factor. Enter factors as 16-QAM × 4-PAM, 4+12 at 2.57 × QPSK, or 24-D4 × 8-PSK.',
  }))
  it('do not take the order from a bare number', () => expect(parseFactors('16 × 4-PAM')).toHaveProperty('refused'))
  it('are not made of products', () => expect(parseFactors('4-product × 4-PAM')).toHaveProperty('refused'))
})
