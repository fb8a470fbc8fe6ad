import type { Method } from './method'
import { tolerances } from './tolerances'

export const symbolError = {
  pairwise: {
    section: 2, title: 'Pairwise error',
    text: 'The probability that the received point lies nearer to one other point than to the one sent: a step over one bisector into a half plane.',
    formulas: [
      { tex: String.raw`P_{ij}=Q\!\left(\frac{d_{ij}}{\sqrt{2N_0}}\right),\qquad Q(x)=\tfrac12\operatorname{erfc}\frac{x}{\sqrt2}` },
    ],
    sources: ['proakis', 'abramowitzStegun', 'dlmf'], tolerance: tolerances.closedForm,
  },
  unionBound: {
    section: 2, title: 'Union bound',
    text: 'The sum of pairwise errors over the relevant neighbours; the sum over all pairs is looser. Either may exceed 1 at low SNR and is reported as it is. At useful SNR the sum over relevant neighbours is close to exact.',
    formulas: [
      { case: 'relevant neighbours', tex: String.raw`P_\mathrm s\le\sum_i p_i\sum_{j\in\mathcal N_i}Q\!\left(\frac{d_{ij}}{\sqrt{2N_0}}\right)` },
      { case: 'all pairs', tex: String.raw`P_\mathrm s\le\sum_i p_i\sum_{j\ne i}Q\!\left(\frac{d_{ij}}{\sqrt{2N_0}}\right)` },
    ],
    sources: ['proakis'], tolerance: tolerances.symbolError,
  },
  nearestNeighbour: {
    section: 2, title: 'Nearest-neighbour approximation',
    text: 'Only nearest neighbours are counted. It is neither an upper nor a lower bound.',
    formulas: [{ tex: String.raw`P_\mathrm s\approx\bar A\;Q\!\left(\frac{d_{\min}}{\sqrt{2N_0}}\right)` }],
    sources: ['proakis', 'forneyUngerboeck'], tolerance: tolerances.symbolError,
  },
  exactSer: {
    section: 2, title: 'Exact symbol error rate',
    text: 'In one dimension, sums of Q to the two thresholds. In two, for any points: each edge of a point’s cell, at signed distance h from the point and from t₁ to t₂ along its line, subtends a wedge in which the noise leaves the cell; the sum over the edges is the point’s error. The substitution t = h sinh v removes the pole at small h, and 32 Gauss–Legendre nodes a piece do the rest. Nothing is subtracted from 1, so that small rates keep their digits.',
    formulas: [
      { case: 'one edge', tex: String.raw`I=\frac1{2\pi}\int_{t_1}^{t_2}e^{-(h^2+t^2)/N_0}\,\frac{h}{h^2+t^2}\,\mathrm dt=\frac1{2\pi}\int\frac{e^{-h^2\cosh^2 v/N_0}}{\cosh v}\,\mathrm dv` },
      { case: 'the rate', tex: String.raw`P_\mathrm s=\sum_i p_i\sum_{\text{edges of }\mathcal R_i}I` },
    ],
    sources: ['craig', 'pawulaRiceRoberts', 'owen'], tolerance: tolerances.symbolError,
  },
  specialSets: {
    section: 2, title: 'Products, orthogonal, biorthogonal and simplex sets',
    text: 'A Cartesian product is right when all its factors are. Orthogonal and biorthogonal sets have one-dimensional integrals, taken in complement form; a simplex set has the error rate of the orthogonal set at M/(M−1) times the energy.',
    formulas: [
      { case: 'product', tex: String.raw`P_\mathrm s=-\operatorname{expm1}\sum_f\operatorname{log1p}(-P_f)` },
      { case: 'orthogonal', tex: String.raw`P_\mathrm s=\int_{-\infty}^{\infty}\phi\!\left(x-\sqrt{2E_\mathrm s/N_0}\right)\left[1-\left(1-Q(x)\right)^{M-1}\right]\mathrm dx` },
      { case: 'biorthogonal', tex: String.raw`P_\mathrm s=1-\int_{0}^{\infty}\phi\!\left(x-\sqrt{2E_\mathrm s/N_0}\right)\left[1-2Q(x)\right]^{M/2-1}\mathrm dx` },
    ],
    sources: ['proakis'], tolerance: tolerances.symbolError,
  },
  lowerBound: {
    section: 2, title: 'Lower bound',
    text: 'Where no exact way is known, a bound from below after de Caen and Séguin: each pairwise error is weighed by how much it overlaps with the others, from bivariate normal probabilities of distances and angles. Together with the union bound it brackets the rate.',
    formulas: [
      { tex: String.raw`P_\mathrm s\ge\sum_i p_i\sum_{j\in\mathcal N_i}\frac{Q_{ij}^2}{\sum_{k\in\mathcal N_i}P(A_{ij}\cap A_{ik})}` },
    ],
    sources: ['seguin'], tolerance: tolerances.symbolError,
  },
  directional: {
    section: 2, title: 'Directional estimate',
    text: 'Between the two bounds: seeded random directions, and along each the exact probability that the noise is longer than the way to the cell’s boundary. A hundred thousand directions give one or two per cent even at rates where counting errors would need 1e11 symbols. Columns show its interval, cut to the two bounds; required SNR is then an interval as well.',
    formulas: [
      { tex: String.raw`P_i=\operatorname{E}_{\mathbf u}\,\frac{\Gamma\!\left(\tfrac N2,\ \rho_i(\mathbf u)^2/N_0\right)}{\Gamma\!\left(\tfrac N2\right)},\qquad \rho_i(\mathbf u)=\min_{j:\,\mathbf u\cdot(\mathbf s_j-\mathbf s_i)>0}\frac{d_{ij}^2}{2\,\mathbf u\cdot(\mathbf s_j-\mathbf s_i)}` },
    ],
    sources: ['commonPractice'], tolerance: tolerances.interval,
  },
  mapDecisions: {
    section: 2, title: 'MAP decisions',
    text: 'With unequal probabilities the receiver may weigh them: the boundary between two points moves toward the rarer one, past it at low SNR, and rare points may lose their cells. Cells are those of a power diagram and depend on the SNR. The row says which points lie outside their own cells and which cells have vanished. Minimum distance remains the default.',
    formulas: [
      { case: 'distance of the boundary to j, from sᵢ', tex: String.raw`h_{ij}=\frac{d_{ij}}2+\frac{N_0}{2d_{ij}}\ln\frac{p_i}{p_j}` },
      { case: 'error of a point', tex: String.raw`P_i=\begin{cases}\sum I&\mathbf s_i\text{ inside its cell}\\ \tfrac12+\sum I&\text{on an edge}\\ 1+\sum I&\text{outside}\\ 1&\text{cell empty}\end{cases}` },
    ],
    sources: ['proakis', 'craig'], tolerance: tolerances.symbolError,
  },
} as const satisfies Record<string, Method>
