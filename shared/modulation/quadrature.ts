/** Nodes and weights of a quadrature rule on [0, 1]. */
export interface Rule {
  nodes: Float64Array
  weights: Float64Array
}

/**
 * Gauss–Legendre rule with n nodes on [0, 1]; exact for polynomials of degree 2n − 1.
 * Newton's method on the Legendre polynomial from Chebyshev-like first guesses.
 * @see Abramowitz and Stegun 25.4.29; Press et al., Numerical Recipes §4.6
 */
export function gaussLegendre(n: number): Rule {
  const nodes = new Float64Array(n)
  const weights = new Float64Array(n)
  for (let i = 0; i < n; i++) {
    let x = -Math.cos(Math.PI * (i + 0.75) / (n + 0.5))
    let slope = 0
    for (let step = 0; step < 6; step++) {
      let previous = 1
      let value = x
      for (let k = 2; k <= n; k++) [previous, value] = [value, ((2 * k - 1) * x * value - (k - 1) * previous) / k]
      slope = n * (x * value - previous) / (x * x - 1)
      x -= value / slope
    }
    nodes[i] = (1 + x) / 2
    weights[i] = 1 / ((1 - x * x) * slope * slope)
  }
  return { nodes, weights }
}
