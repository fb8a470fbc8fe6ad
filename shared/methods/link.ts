import type { Method } from './method'
import { tolerances } from './tolerances'

export const link = {
  linkBudget: {
    section: 7, title: 'Link budget',
    text: 'C/N0 is the sum of a case’s lines. Typed lines compute themselves: free-space loss from frequency and distance, noise density from noise figure, system temperature or G/T, and so on. Losses are entered positive and subtracted, and dBm with dBW is refused. Where the study is limited by peak power the row’s back-off is taken off.',
    formulas: [
      { case: 'free space', tex: String.raw`L=20\log_{10}\frac{4\pi d f}{c}` },
      { case: 'noise density', tex: String.raw`N_0=10\log_{10}(k\,T),\qquad T=290\,\mathrm K\cdot10^{\mathrm{NF}/10}` },
      { case: 'available', tex: String.raw`\frac{E_\mathrm s}{N_0}=\frac C{N_0}-\mathrm{OBO}-10\log_{10}R_\mathrm s` },
    ],
    sources: ['ituP525', 'ituP372', 'codata'], tolerance: tolerances.linkDb,
  },
  bandwidth: {
    section: 7, title: 'Rates and bandwidth',
    text: 'The study holds symbol rate, occupied bandwidth or net bit rate constant, and the other two follow a row. D counts the real dimensions that one symbol interval of one Nyquist band offers: 2 for an I/Q carrier, 1 for one quadrature, 4 for two polarisations.',
    formulas: [
      { tex: String.raw`B=R_\mathrm s\,\frac ND\,(1+\alpha),\qquad R_\mathrm b=R\,R_\mathrm s\,(1-\text{overhead}),\qquad \eta=\frac{R_\mathrm b}{B}` },
    ],
    sources: ['nyquist', 'proakis', 'threeGppUtra'], tolerance: tolerances.closedForm,
  },
  margin: {
    section: 7, title: 'Margin, surplus and verdict',
    text: 'Every link case has its own target and required margin; the worst surplus decides. A candidate passes when every must-have holds, judged on unrounded numbers and, where only an interval is known, at its unfavourable end. Margins are shown rounded down.',
    formulas: [
      { tex: String.raw`\text{margin}=\text{available}-\text{required}-\text{implementation loss},\qquad \text{surplus}=\text{margin}-\text{required margin}` },
    ],
    sources: ['commonPractice'], tolerance: tolerances.marginDb,
  },
} as const satisfies Record<string, Method>
