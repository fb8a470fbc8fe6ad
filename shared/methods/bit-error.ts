import type { Method } from './method'
import { tolerances } from './tolerances'

export const bitError = {
  labels: {
    section: 3, title: 'Labels',
    text: 'Labels are k-bit words, one a point, all different, most significant bit first. Amplitudes, phases and square grids carry Gray labels as the standards map them, ring sets those of ETSI; cross and hexagonal sets, which have no Gray labels, carry near-Gray ones found by a seeded search. A candidate may have its own, or the natural binary ones.',
    formulas: [{ case: 'reflected Gray code', tex: String.raw`g(n)=n\oplus\lfloor n/2\rfloor` }],
    sources: ['gray', 'threeGppNr', 'ieee80211', 'etsi', 'smith'],
  },
  exactBer: {
    section: 3, title: 'Exact bit error rate',
    text: 'One or two dimensions, any labels. Every edge of the whole diagram is walked once, with region a on its left and b on its right: stepping over it changes the number of wrong bits by the difference of two Hamming distances, and the signed wedge integral, seen from each point, says how likely that is. Far edges may be skipped where all of them together cannot change the result by 1e−10.',
    formulas: [
      { tex: String.raw`P_\mathrm b=-\frac1k\sum_i p_i\sum_{(a|b)}\left[d_\mathrm H(i,a)-d_\mathrm H(i,b)\right]I_i(a|b)` },
    ],
    sources: ['szczecinski', 'choYoon', 'craig'], tolerance: tolerances.bitError,
  },
  berBounds: {
    section: 3, title: 'Bit error rate: approximation and bound',
    text: 'Pairwise errors weighed by the share of wrong bits. Over relevant neighbours it is an approximation, not a bound, for a farther region may hold more wrong bits; only the sum over all pairs bounds.',
    formulas: [
      { case: 'approximation', tex: String.raw`P_\mathrm b\approx\frac1k\sum_i p_i\sum_{j\in\mathcal N_i}d_\mathrm H(i,j)\,Q\!\left(\frac{d_{ij}}{\sqrt{2N_0}}\right)` },
      { case: 'bound', tex: String.raw`P_\mathrm b\le\frac1k\sum_i p_i\sum_{j\ne i}d_\mathrm H(i,j)\,Q\!\left(\frac{d_{ij}}{\sqrt{2N_0}}\right)` },
    ],
    sources: ['proakis', 'caireTariccoBiglieri'], tolerance: tolerances.bitError,
  },
  labelSearch: {
    section: 3, title: 'Label search',
    text: 'Binary switching from several seeded starts: the swap of two labels that lowers the bit error rate most is made, until none does. The result is the best seen, never worse than the labels it began with, and says how many swaps and starts it took; it is a local optimum, not a proof.',
    formulas: [],
    sources: ['zeger'],
  },
} as const satisfies Record<string, Method>
