import { describe, expect, it } from 'vitest'
import { analyse, createConstellation, ebN0Db, fromDecibels, generate, q, requiredEsN0Db, serExact, serNearest, serUnionBound } from '../../shared/modulation'
import type { FamilyId, FamilyParameters } from '../../shared/modulation'

const relative = (value: number, reference: number) => Math.abs(value / reference - 1)
const geometryOf = (id: FamilyId, parameters: FamilyParameters) => analyse(generate(id, parameters))
const exactDb = (id: FamilyId, parameters: FamilyParameters, target: number) =>
  requiredEsN0Db({ geometry: geometryOf(id, parameters), kind: 'serExact' }, target)

// J. G. Proakis, Digital Communications: square QAM as two independent PAM signals
describe('Proakis, square QAM', () => {
  const closed = (order: number, esN0: number) => {
    const p = 2 * (1 - 1 / Math.sqrt(order)) * q(Math.sqrt(3 * esN0 / (order - 1)))
    return 2 * p - p * p
  }
  it.each([
    { order: 4, db: 10 }, { order: 16, db: 17 }, { order: 64, db: 26 }, { order: 256, db: 30 }, { order: 1024, db: 20 },
  ])('SER of $order-QAM at $db dB is 1 − (1 − p)²', ({ order, db }) => {
    expect(relative(serExact(geometryOf('qam', { order }), 1 / fromDecibels(db)), closed(order, fromDecibels(db)))).toBeLessThan(1e-10)
  })
})

// J. G. Proakis, Digital Communications: binary antipodal signals need Eb/N0 = 9.6 dB for 1e-5 and 10.5 dB for 1e-6 (from memory)
describe('Proakis, binary PSK', () => {
  it('1e-5 takes 9.59 dB', () => expect(exactDb('psk', { order: 2 }, 1e-5)).toBeCloseTo(9.588, 2))
  it('1e-6 takes 10.53 dB', () => expect(exactDb('psk', { order: 2 }, 1e-6)).toBeCloseTo(10.530, 2))
  it('SER is Q(√(2·Es/N0))', () => expect(relative(serExact(geometryOf('psk', { order: 2 }), 0.1), q(Math.sqrt(20)))).toBeLessThan(1e-12))
  it('the bound on PSK is 2·Q(√(2·Es/N0)·sin(π/M))', () => {
    expect(relative(serUnionBound(geometryOf('psk', { order: 16 }), 0.01), 2 * q(Math.sqrt(200) * Math.sin(Math.PI / 16)))).toBeLessThan(1e-12)
  })
})

// J. G. Proakis, Digital Communications, 4th ed., table 5.2-1 (from memory): 10·log10 of 3/(M−1) / (2·sin²(π/M))
describe('Proakis, SNR advantage of QAM over PSK', () => {
  const advantage = (order: number) => 20 * Math.log10(geometryOf('qam', { order }).minimumDistance / geometryOf('psk', { order }).minimumDistance)
  it('is 4.20 dB for 16 points', () => expect(advantage(16)).toBeCloseTo(4.20, 2))
  it('is 9.95 dB for 64 points', () => expect(advantage(64)).toBeCloseTo(9.95, 2))
})

// M. K. Simon and M.-S. Alouini, Digital Communication over Fading Channels, §8.1: M-PAM (M-AM) on the Gaussian channel
describe('Simon and Alouini, PAM', () => {
  it.each([{ order: 2, db: 8 }, { order: 4, db: 14 }, { order: 8, db: 22 }, { order: 5, db: 15 }])(
    'SER of $order-PAM at $db dB is 2(M−1)/M·Q(√(6·Es/((M²−1)·N0)))',
    ({ order, db }) => {
      const closed = 2 * (order - 1) / order * q(Math.sqrt(6 * fromDecibels(db) / (order * order - 1)))
      expect(relative(serExact(geometryOf('pam', { order }), 1 / fromDecibels(db)), closed)).toBeLessThan(1e-12)
    })
})

// J. W. Craig, MILCOM 1991; R. F. Pawula, S. O. Rice, J. H. Roberts, IEEE Trans. Commun. 30 (1982): exact PSK
describe('Craig 1991, Pawula, Rice and Roberts 1982', () => {
  /** (1/π)∫ exp(−(Es/N0)·sin²(π/M)/sin²θ) dθ from 0 to π(M−1)/M, by 20,000 steps of Simpson's rule. */
  const closed = (order: number, esN0: number) => {
    const steps = 20_000
    const end = Math.PI * (order - 1) / order
    const f = (theta: number) => theta === 0 ? 0 : Math.exp(-esN0 * (Math.sin(Math.PI / order) / Math.sin(theta)) ** 2)
    let sum = f(0) + f(end)
    for (let n = 1; n < steps; n++) sum += (n % 2 === 0 ? 2 : 4) * f(end * n / steps)
    return sum * end / steps / 3 / Math.PI
  }
  it.each([{ order: 3, db: 6 }, { order: 8, db: 14 }, { order: 8, db: 0 }, { order: 16, db: 22 }, { order: 32, db: 30 }])(
    'SER of $order-PSK at $db dB',
    ({ order, db }) => expect(relative(serExact(geometryOf('psk', { order }), 1 / fromDecibels(db)), closed(order, fromDecibels(db)))).toBeLessThan(1e-9),
  )
})

// G. Ungerboeck, "Channel coding with multilevel/phase signals", IEEE Trans. Inf. Theory 28 (1982)
describe('Ungerboeck 1982', () => {
  it('uncoded 4-PSK needs 12.9 dB for an error rate of 1e-5', () => expect(exactDb('psk', { order: 4 }, 1e-5)).toBeCloseTo(12.9, 1))
  it('8-PSK has the distance Δ0 = 2·sin(π/8) = 0.765', () => expect(geometryOf('psk', { order: 8 }).minimumDistance).toBeCloseTo(0.765, 3))
  it('its subsets, 4-PSK, have Δ1 = 1.414', () => expect(geometryOf('psk', { order: 4 }).minimumDistance).toBeCloseTo(1.414, 3))
})

// G. J. Foschini, R. D. Gitlin, S. B. Weinstein, "Optimization of two-dimensional signal constellations in the presence of
// Gaussian noise", IEEE Trans. Commun. 22 (1974): the best 16 points gain about 0.5 dB on the square (from memory)
describe('Foschini, Gitlin and Weinstein 1974', () => {
  it('sixteen points of a triangular lattice gain 0.5 dB on 16-QAM at 1e-6', () => {
    expect(exactDb('qam', { order: 16 }, 1e-6) - exactDb('hexagonal', { order: 16 }, 1e-6)).toBeCloseTo(0.5, 1)
  })
})

// G. D. Forney and G. Ungerboeck, "Modulation and coding for linear Gaussian channels", IEEE Trans. Inf. Theory 44 (1998):
// large square QAM obeys 4·Q(√(3·SNRnorm)) per two dimensions, 8.4 dB at 1e-5 (from memory)
describe('Forney and Ungerboeck 1998', () => {
  const normalised = (target: number) => {
    const required = requiredEsN0Db({ geometry: geometryOf('qam', { order: 4096 }), kind: 'serNearest' }, target)
    return required - 10 * Math.log10(4096 - 1)
  }
  it('4096-QAM needs a normalised SNR of 8.4 dB at 1e-5', () => expect(normalised(1e-5)).toBeCloseTo(8.4, 1))
  it('its mean number of nearest neighbours nears 4', () => expect(geometryOf('qam', { order: 4096 }).nearestMean).toBeCloseTo(4 - 4 / 64, 12))
})

// Common practice: at useful SNR the bound over relevant neighbours is close to exact
describe('union bound over relevant neighbours', () => {
  it('is within 0.1 % of exact for 16-QAM at 1e-6', () => {
    const geometry = geometryOf('qam', { order: 16 })
    const n0 = 1 / fromDecibels(20.92)
    expect(serUnionBound(geometry, n0) / serExact(geometry, n0) - 1).toBeLessThan(1e-3)
  })
  it('equals the nearest-neighbour approximation on PSK', () => {
    const geometry = geometryOf('psk', { order: 8 })
    expect(relative(serNearest(geometry, 0.05), serUnionBound(geometry, 0.05))).toBeLessThan(1e-12)
  })
})

// Common practice: QPSK is two binary channels, so its bit error rate is that of binary PSK at the same Eb/N0
describe('QPSK as two binary channels', () => {
  it('has 1 − (1 − Q(√(2·Eb/N0)))²', () => {
    const p = q(Math.sqrt(2 * fromDecibels(ebN0Db(12, 2))))
    expect(relative(serExact(geometryOf('qam', { order: 4 }), 1 / fromDecibels(12)), 2 * p - p * p)).toBeLessThan(1e-11)
  })
  it('does not change when it is turned', () => {
    const turned = createConstellation([[0.6, 0.8], [-0.8, 0.6], [-0.6, -0.8], [0.8, -0.6]])
    expect(relative(serExact(analyse(turned), 0.1), serExact(geometryOf('psk', { order: 4 }), 0.1))).toBeLessThan(1e-11)
  })
})
