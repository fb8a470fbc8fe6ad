import type { Method } from './method'
import { tolerances } from './tolerances'

export const channels = {
  fading: {
    section: 6, title: 'Fading',
    text: 'The SNR itself is random: Rayleigh, Rician with factor K, or Nakagami with m, with maximal-ratio combining of L independent branches of the same mean. SNR is the mean per branch; the receiver knows its channel. In the finite-range form the exponential turns into the moment generating function of the SNR, so that bound, approximation and exact rate are averaged without simulation. MAP decisions with fading are refused.',
    formulas: [
      { case: 'an edge seen under the angles θ₁ to θ₂', tex: String.raw`\bar I=\frac1{2\pi}\int_{\theta_1}^{\theta_2}M_\gamma\!\left(-\frac{h^2/E_\mathrm s}{\sin^2\theta}\right)^{\!L}\mathrm d\theta` },
      { case: 'Rayleigh', tex: String.raw`M_\gamma(-s)=\frac1{1+s\bar\gamma}` },
      { case: 'Rician', tex: String.raw`M_\gamma(-s)=\frac{1+K}{1+K+s\bar\gamma}\exp\!\left(-\frac{K\,s\bar\gamma}{1+K+s\bar\gamma}\right)` },
      { case: 'Nakagami', tex: String.raw`M_\gamma(-s)=\left(1+\frac{s\bar\gamma}{m}\right)^{-m}` },
    ],
    sources: ['simonAlouini', 'craig', 'proakis'], tolerance: tolerances.channel,
  },
  phaseError: {
    section: 6, title: 'Carrier phase error',
    text: 'A normal phase error of r.m.s. σ turns the sent point against cells that stay where they are; the exact rate is averaged over it, with panels split where the point crosses an edge. The curve has a floor: the share of phase errors that carry a point out of its cell without noise.',
    formulas: [{ tex: String.raw`P=\int\frac{e^{-\varphi^2/2\sigma^2}}{\sqrt{2\pi}\,\sigma}\;P\!\left(e^{\mathrm j\varphi}\mathbf s_i\notin\mathcal R_i\right)\mathrm d\varphi` }],
    sources: ['proakis'], tolerance: tolerances.channel,
  },
  frameError: {
    section: 6, title: 'Frame error rate',
    text: 'A frame of n uncoded symbols with independent errors is right when every symbol is.',
    formulas: [{ tex: String.raw`P_\mathrm{frame}=-\operatorname{expm1}\!\left(n\operatorname{log1p}(-P_\mathrm s)\right)` }],
    sources: ['commonPractice'], tolerance: tolerances.symbolError,
  },
  backOff: {
    section: 6, title: 'Amplifier back-off',
    text: 'How far below saturation the amplifier runs: entered; or the peak factor of the waveform that root-raised-cosine pulses make of the row’s own symbols, at a stated probability of being exceeded, by seeded simulation; or the PAPR of the points alone, named as such.',
    formulas: [
      { tex: String.raw`x(t)=\sum_n\mathbf s_{i_n}\,g_\alpha(t-nT),\qquad P\!\left(\frac{|x|^2}{\operatorname{E}|x|^2}>10^{\,\mathrm{OBO}/10}\right)=\epsilon` },
    ],
    sources: ['rice', 'nyquist'], tolerance: tolerances.backOff,
  },
} as const satisfies Record<string, Method>
