import type { Method } from './method'
import { tolerances } from './tolerances'

export const geometry = {
  distances: {
    section: 1, title: 'Distances',
    text: 'The minimum distance rules the error rate at high SNR. Nearest neighbours are the points within one part in 1e9 of it; their mean count is the factor of the nearest-neighbour approximation. Points closer than 1e−9 of the outermost point’s radius are the same point and are refused.',
    formulas: [
      { tex: String.raw`d_{ij}=|\mathbf s_i-\mathbf s_j|,\qquad d_{\min}=\min_{i\ne j}d_{ij},\qquad \bar A=\sum_i p_i\,\#\{\,j\ne i:\ d_{ij}\le(1+10^{-9})\,d_{\min}\,\}` },
    ],
    sources: ['proakis'], tolerance: tolerances.closedForm,
  },
  relevantNeighbours: {
    section: 1, title: 'Relevant neighbours',
    text: 'Point j is relevant to point i when the bisector between them carries a facet of the decision cell of i. Cells that touch in a corner alone do not count: in a square grid the diagonal is no neighbour, although a triangulation may draw it. In two dimensions these are the Delaunay edges whose Voronoi edge is longer than 1e−9 of the minimum distance, and where that is close, exact arithmetic decides. In more dimensions one small linear programme a pair decides whether the cell would grow without that bisector.',
    formulas: [
      { tex: String.raw`\mathcal R_i=\{\mathbf x:\ |\mathbf x-\mathbf s_i|\le|\mathbf x-\mathbf s_j|\ \ \forall j\},\qquad j\in\mathcal N_i\iff \dim\left(\mathcal R_i\cap\mathcal R_j\right)=N-1` },
      { case: 'three dimensions and more', tex: String.raw`\max_{\mathbf x\in\bigcap_{k\ne j}H_{ik}}(\mathbf x-\mathbf s_i)\cdot(\mathbf s_j-\mathbf s_i)\ >\ \frac{d_{ij}^2}{2}\left(1+10^{-7}\right)` },
    ],
    sources: ['deBerg', 'coxeter', 'conwaySloane'], tolerance: tolerances.neighbours,
  },
  powerEfficiency: {
    section: 1, title: 'Asymptotic power efficiency',
    text: 'Squared minimum distance per net bit energy against that of two antipodal points: what a set gains or loses when the target is very small.',
    formulas: [{ tex: String.raw`\gamma=10\log_{10}\frac{d_{\min}^2}{4E_\mathrm b}\ \mathrm{dB}` }],
    sources: ['agrellKarlsson'], tolerance: tolerances.closedForm,
  },
  noiselessTolerances: {
    section: 1, title: 'Tolerances without noise',
    text: 'The largest rotation, and the largest gain error, for which every point still lies in its own decision cell. Both follow from the points and the lines of their cells alone.',
    formulas: [
      { tex: String.raw`\varphi_{\max}=\max\{\varphi:\ e^{\mathrm j\theta}\mathbf s_i\in\mathcal R_i\ \ \forall i,\ |\theta|\le\varphi\},\qquad g\,\mathbf s_i\in\mathcal R_i\ \ \forall i` },
      { case: 'to the edge between i and j', tex: String.raw`g\,\mathbf s_i\cdot(\mathbf s_j-\mathbf s_i)\le\tfrac12\left(|\mathbf s_j|^2-|\mathbf s_i|^2\right)` },
    ],
    sources: ['commonPractice'], tolerance: tolerances.closedForm,
  },
  evm: {
    section: 1, title: 'Error vector magnitude',
    text: 'The r.m.s. length of the noise over the r.m.s. length of the signal, in per cent: the magnitude that corresponds to an SNR when noise is all there is.',
    formulas: [{ tex: String.raw`\mathrm{EVM}=\sqrt{\frac{N\,N_0}{2E_\mathrm s}}` }],
    sources: ['commonPractice'], tolerance: tolerances.evm,
  },
} as const satisfies Record<string, Method>
