import { analyse, createConstellation, q, qInverse, serExact } from '../../modulation'
import type { Check } from './check'
import { polygonError, rectangleError } from './tools'

const table = (x: number, published: string): Check => ({
  method: 'pairwise', what: `Q(${x})`, published, source: 'abramowitzStegun', place: 'table 26.1', compute: () => q(x),
})
const phi = (x: number) => 1 - q(x)

/** Values of Q, and identities of Owen's T, which is the integral behind the exact rate. */
export const gaussianChecks: readonly Check[] = [
  table(1, '0.1586552539'), table(2, '0.0227501319'), table(3, '0.0013498980'), table(5, '2.866516e-7'),
  {
    method: 'pairwise', what: 'Q(−1.7) + Q(1.7)', published: '1', within: 1e-15, source: 'dlmf', place: '7.4.2', compute: () => q(-1.7) + q(1.7),
  },
  {
    method: 'pairwise', what: 'Q(20) against its asymptotic expansion', source: 'dlmf', place: '7.12.1', within: { relative: 1e-8 },
    published: () => Math.exp(-200) / (20 * Math.sqrt(2 * Math.PI)) * (1 - 1 / 400 + 3 / 160_000 - 15 / 64e6), compute: () => q(20),
  },
  { method: 'pairwise', what: 'Q(x) = 0.025 at x', published: '1.959963985', source: 'abramowitzStegun', place: 'table 26.5', memory: true, compute: () => qInverse(0.025) },
  {
    method: 'exactSer', what: 'T(1, 1) = ½·Φ(1)·(1 − Φ(1)), from a square cell', published: () => 0.5 * 0.8413447461 * 0.1586552539, within: 1e-10,
    source: 'owen', compute: () => polygonError(4, 1) / 8,
  },
  {
    method: 'exactSer', what: 'T(4, 1) = ½·Φ(4)·(1 − Φ(4)), from a square cell', published: () => 0.5 * phi(4) * q(4), within: { relative: 1e-11 },
    source: 'owen', compute: () => polygonError(4, 4) / 8,
  },
  { method: 'exactSer', what: 'T(0, a) = arctan(a)/2π: a cell of no size is always left', published: '1', within: 1e-9, source: 'owen', compute: () => polygonError(5, 1e-5) },
  {
    method: 'exactSer', what: '2·T(h, ∞) = Q(h), two points at h = 1.5', published: '0.0668072013', source: 'owen', memory: true,
    compute: () => serExact(analyse(createConstellation([[0, 0], [3, 0]])), 2),
  },
  {
    method: 'exactSer', what: 'T(h, a) + T(ah, 1/a) = ½·Φ(h) + ½·Φ(ah) − Φ(h)·Φ(ah), from a rectangular cell', source: 'owen', within: 1e-13,
    published: () => phi(0.8) / 2 + phi(2) / 2 - phi(0.8) * phi(2), compute: () => rectangleError(0.8, 2) / 4,
  },
]
