import type { Method } from './method'
import { tolerances } from './tolerances'

export const requiredSnr = {
  requiredSnr: {
    section: 4, title: 'Required SNR',
    text: 'The smallest Es/N0 above which the chosen error rate stays at or below the target, between −30 and 90 dB, by a bracketing root finder on the logarithm of the rate. Symbol error rates of minimum-distance decisions fall with SNR. Bit error rates of odd labels, and curves with phase error, need not: where a curve crosses the target more than once, or flattens out above it, the row says so.',
    formulas: [{ tex: String.raw`\left(\frac{E_\mathrm s}{N_0}\right)_{\!\mathrm{req}}=\min\left\{\gamma:\ P(\gamma')\le P_\mathrm{target}\ \ \forall\gamma'\ge\gamma\right\}` }],
    sources: ['commonPractice'], tolerance: tolerances.requiredDb,
  },
  bases: {
    section: 4, title: 'Bases of required SNR',
    text: 'Uncoded: from an error rate at r = 1. Rate threshold: from an information rate at the row’s code rate, plus a decoder gap that is entered with its source. Entered: a value with its source, for schemes outside the model. A code rate below 1 with an uncoded basis is refused, for it would charge for the code and credit nothing. A target before decoding asks a rate-threshold row for the greater of its threshold and the SNR at which the error rate before decoding meets the target.',
    formulas: [
      { case: 'rate threshold, after decoding', tex: String.raw`\left(\frac{E_\mathrm s}{N_0}\right)_{\!\mathrm{req}}=\left(\frac{E_\mathrm s}{N_0}\right)_{\!R}+\Delta_\mathrm{decoder}\qquad[\mathrm{dB}]` },
    ],
    sources: ['bocherer', 'commonPractice'], tolerance: tolerances.thresholdDb,
  },
  boundPenalty: {
    section: 4, title: 'Bound penalty',
    text: 'Required SNR by the union bound minus required SNR exact: how much working with the bound costs.',
    formulas: [{ tex: String.raw`\Delta_\mathrm{bound}=\left(\frac{E_\mathrm s}{N_0}\right)_{\!\mathrm{bound}}-\left(\frac{E_\mathrm s}{N_0}\right)_{\!\mathrm{exact}}\qquad[\mathrm{dB}]` }],
    sources: ['commonPractice'], tolerance: tolerances.differenceDb,
  },
} as const satisfies Record<string, Method>
