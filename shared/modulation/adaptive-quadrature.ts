/** Nodes of the 21-point Kronrod rule on [−1, 1] from the middle outwards, positive side; every other one is of the 10-point Gauss rule. */
const nodes = [0.14887433898163122, 0.2943928627014602, 0.4333953941292472, 0.5627571346686047, 0.6794095682990244,
  0.7808177265864169, 0.8650633666889845, 0.9301574913557082, 0.9739065285171717, 0.9956571630258081] as const
const middleWeight = 0.14944555400291692
const kronrodWeights = [0.1477391049013385, 0.14277593857706009, 0.13470921731147334, 0.12349197626206584, 0.10938715880229764,
  0.09312545458369761, 0.07503967481091996, 0.054755896574351995, 0.032558162307964725, 0.011694638867371874] as const
const gaussWeights = [0.29552422471475287, 0.26926671930999635, 0.21908636251598204, 0.1494513491505806, 0.06667134430868814] as const

/** Panels after which an integrand is given up as too rough; far above what any error rate has taken. */
const mostPanels = 400

interface Panel {
  from: number
  to: number
  value: number
  error: number
}

/**
 * Integral by a composite Gauss–Legendre rule with Kronrod's extension, whose worst panel is halved until all together are good enough.
 * @param f integrand
 * @param breaks rising places, the first and the last of them the ends, between which f is smooth
 * @param relative wanted error over the integral
 * @param absolute error that is good enough anyway
 * @see Piessens, de Doncker-Kapenga, Überhuber, Kahaner, QUADPACK (1983): rule QK21 and its error estimate
 */
export function integrateAdaptively(f: (x: number) => number, breaks: readonly number[], relative: number, absolute: number): number {
  const panels = breaks.slice(1).map((to, n) => panelOf(f, breaks[n]!, to))
  for (;;) {
    let [sum, error, worst] = [0, 0, 0]
    panels.forEach((panel, n) => {
      sum += panel.value
      error += panel.error
      if (panel.error > panels[worst]!.error) worst = n
    })
    if (error <= Math.max(relative * Math.abs(sum), absolute) || panels.length >= mostPanels) return sum
    const { from, to } = panels[worst]!
    panels[worst] = panelOf(f, from, (from + to) / 2)
    panels.push(panelOf(f, (from + to) / 2, to))
  }
}

const values = new Float64Array(2 * nodes.length)

function panelOf(f: (x: number) => number, from: number, to: number): Panel {
  const half = (to - from) / 2
  const middle = (from + to) / 2
  const central = f(middle)
  let kronrod = middleWeight * central
  let gauss = 0
  for (let n = 0; n < nodes.length; n++) {
    const below = values[2 * n] = f(middle - half * nodes[n]!)
    const above = values[2 * n + 1] = f(middle + half * nodes[n]!)
    kronrod += kronrodWeights[n]! * (below + above)
    if (n % 2 === 0) gauss += gaussWeights[n / 2]! * (below + above)
  }
  const mean = kronrod / 2
  let spread = middleWeight * Math.abs(central - mean)
  for (let n = 0; n < nodes.length; n++) {
    spread += kronrodWeights[n]! * (Math.abs(values[2 * n]! - mean) + Math.abs(values[2 * n + 1]! - mean))
  }
  const difference = Math.abs(kronrod - gauss)
  const error = spread > 0 ? spread * Math.min(1, (200 * difference / spread) ** 1.5) : difference
  return { from, to, value: kronrod * half, error: error * half }
}
