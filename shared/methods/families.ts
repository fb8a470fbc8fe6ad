import type { Method } from './method'

export const families = {
  families: {
    section: 8, title: 'Families',
    text: 'PAM, PSK, QAM and cross QAM, ring sets (APSK), hexagonal sets, orthogonal, biorthogonal and simplex sets, hypercubes, cuts of the lattices A2, D4 and E8, Cartesian products, and points of one’s own: up to 4096 points in up to 8 dimensions. Generated sets have unit mean energy before they are normalised.',
    formulas: [
      { case: 'rectangular QAM', tex: String.raw`2^{\lceil k/2\rceil}\times2^{\lfloor k/2\rfloor}\ \text{odd integers}` },
      { case: 'APSK, ring q', tex: String.raw`r_q\,e^{\,\mathrm j\left(\varphi_q+2\pi n/n_q\right)},\qquad \varphi_q=\pi/n_q\ \text{unless given}` },
      { case: 'simplex from orthogonal', tex: String.raw`\mathbf s_i=\mathbf e_i-\frac1M\sum_j\mathbf e_j` },
    ],
    sources: ['threeGppNr', 'smith', 'etsi', 'grahamSloane', 'conwaySloane', 'proakis'],
  },
  parameterSearch: {
    section: 8, title: 'Parameter search',
    text: 'Ring ratios, ring phases, offsets or free points are varied within bounds from seeded starts until the required SNR no longer falls or the budget is spent; with peak power as the limit the back-off counts. The result becomes a candidate that says how it was found. It is never worse than its start, and a search that did not converge says so.',
    formulas: [],
    sources: ['foschini', 'commonPractice'],
  },
} as const satisfies Record<string, Method>
