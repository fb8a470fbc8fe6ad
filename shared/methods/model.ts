import type { Method } from './method'
import { tolerances } from './tolerances'

export const model = {
  model: {
    section: 0, title: 'Model',
    text: 'M points in N real dimensions are sent with probabilities pᵢ, 1/M unless given. The channel adds white Gaussian noise of the same variance N0/2 in every dimension. Energies are about the origin: an offset of the points costs energy, and nothing is recentred silently.',
    formulas: [
      { tex: String.raw`\mathbf x=\mathbf s_i+\mathbf n,\qquad \mathbf n\sim\mathcal N\!\left(\mathbf 0,\tfrac{N_0}{2}\mathbf I_N\right)` },
      { tex: String.raw`E_\mathrm s=\sum_i p_i\,|\mathbf s_i|^2,\qquad E_\mathrm{pk}=\max_i|\mathbf s_i|^2,\qquad \mathrm{PAPR}=10\log_{10}\frac{E_\mathrm{pk}}{E_\mathrm s}\ \mathrm{dB}` },
    ],
    sources: ['proakis'], tolerance: tolerances.closedForm,
  },
  netBits: {
    section: 0, title: 'Net bits per symbol',
    text: 'The code rate r takes its share of the k = log2 M label bits; with unequal probabilities the symbol carries its entropy H only. What is left, R, is what energy per bit, spectral efficiency, rates and gaps use.',
    formulas: [
      { tex: String.raw`H=-\sum_i p_i\log_2 p_i,\qquad R=H-(1-r)\,k` },
      { case: 'equal probabilities', tex: String.raw`R=r\,k` },
    ],
    sources: ['bocherer'], tolerance: tolerances.closedForm,
  },
  snrAxes: {
    section: 0, title: 'SNR axes',
    text: 'One noise density, four ways to name the signal: energy per symbol, per net bit, of the outermost point, or the squared minimum distance. How points are scaled changes nothing on any of them; it matters only where a study gives N0 itself in signal units.',
    formulas: [
      { tex: String.raw`\frac{E_\mathrm b}{N_0}=\frac{1}{R}\,\frac{E_\mathrm s}{N_0},\qquad \frac{E_\mathrm{pk}}{N_0}=\frac{E_\mathrm s}{N_0}\cdot\frac{E_\mathrm{pk}}{E_\mathrm s},\qquad \frac{d_{\min}^2}{2N_0}` },
    ],
    sources: ['proakis'], tolerance: tolerances.closedForm,
  },
} as const satisfies Record<string, Method>
