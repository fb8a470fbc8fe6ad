import type { Method } from './method'
import { tolerances } from './tolerances'

export const information = {
  informationRates: {
    section: 5, title: 'Information rates',
    text: 'Mutual information is what any code may reach with these points; the bit-metric rate is what a code may reach whose decoder is told of each label bit alone, which depends on the labels. In one and two dimensions both are integrated on a regular lattice of nodes that is refined until the change is below 1e−6 bit; rectangular sets and products follow from their factors. In more dimensions they are simulated from a seed and shown with their interval.',
    formulas: [
      { case: 'mutual information', tex: String.raw`I(X;Y)=-\int p(\mathbf y)\log_2 p(\mathbf y)\,\mathrm d\mathbf y-\frac N2\log_2(\pi e N_0)` },
      { case: 'bit-metric rate', tex: String.raw`R_\mathrm{bm}=\Big[H-\sum_{b=1}^{k}H(B_b\mid Y)\Big]^+` },
    ],
    sources: ['shannon', 'ungerboeck', 'caireTariccoBiglieri', 'bocherer'], tolerance: tolerances.rate,
  },
  rateThreshold: {
    section: 5, title: 'Rate threshold',
    text: 'The SNR at which the chosen information rate reaches the net bits R. A code rate of 1 has none: the rate nears H only as the SNR grows without end.',
    formulas: [{ tex: String.raw`I\!\left(\tfrac{E_\mathrm s}{N_0}\right)=R\qquad\text{or}\qquad R_\mathrm{bm}\!\left(\tfrac{E_\mathrm s}{N_0}\right)=R` }],
    sources: ['ungerboeck', 'ryanLin', 'etsi'], tolerance: tolerances.thresholdDb,
  },
  capacity: {
    section: 5, title: 'Capacity and the gap to it',
    text: 'Capacity is what the best signals of N dimensions and the same energy may reach. The gap is the row’s required SNR, coded (the rate threshold without the decoder’s gap) or uncoded, minus the SNR at which capacity equals the row’s net bits; it is given for the AWGN channel only. No scheme needs less Eb/N0 than ln 2, −1.59 dB.',
    formulas: [
      { tex: String.raw`C=\frac N2\log_2\!\left(1+\frac{2E_\mathrm s}{N\,N_0}\right),\qquad \Delta_C=\left(\frac{E_\mathrm s}{N_0}\right)_{\!\mathrm{req}}-10\log_{10}\!\left[\frac N2\left(2^{2R/N}-1\right)\right]` },
    ],
    sources: ['shannon', 'forneyUngerboeck'], tolerance: tolerances.requiredDb,
  },
  shaping: {
    section: 5, title: 'Shaping',
    text: 'Points of less energy are sent more often. For a wanted entropy the Maxwell–Boltzmann law spends the least mean energy; its one parameter ν is found from that entropy. Full shaping gains up to πe/6, 1.53 dB.',
    formulas: [{ tex: String.raw`p_i\propto e^{-\nu|\mathbf s_i|^2},\qquad -\sum_i p_i\log_2 p_i=H_\mathrm{wanted}` }],
    sources: ['kschischang', 'bocherer', 'forneyWei'], tolerance: tolerances.closedForm,
  },
} as const satisfies Record<string, Method>
