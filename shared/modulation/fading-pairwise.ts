import type { Fading } from './fading'
import { fadedPiece } from './fading-edge'

/** Nodes of a polynomial over one octave of d²/(4·N0): 1e-12 relative, as tests/unit/modulation/fading.test.ts measures. */
const nodeCount = 16
const angles = Array.from({ length: nodeCount }, (_, n) => Math.PI * (n + 0.5) / nodeCount)

/**
 * Mean pairwise error probability E Q(√(2·c·g)), c = d²/(4·N0), over a fading channel, for many pairs of points. Its logarithm over log c
 * is smooth (it has no singularity within π of the real axis), so that Chebyshev polynomials over octaves carry it; each is made when it is first needed.
 * @see methods §6; Simon and Alouini, Digital Communication over Fading Channels, §5.4
 */
export class FadedPairwise {
  private readonly octaves = new Map<number, Float64Array>()

  constructor(private readonly fading: Fading) {}

  /** @param c d²/(4·N0), above 0 */
  at(c: number): number {
    const x = Math.log2(c)
    const octave = Math.floor(x)
    let coefficients = this.octaves.get(octave)
    if (!coefficients) this.octaves.set(octave, coefficients = this.coefficientsOf(octave))
    return Math.exp(clenshaw(coefficients, 2 * (x - octave) - 1))
  }

  private coefficientsOf(octave: number): Float64Array {
    // Twice the half line from the foot on; what underflows is taken for the least number.
    const logs = angles.map(angle =>
      Math.log(Math.max(Number.MIN_VALUE, 2 * fadedPiece(this.fading, 1, 0, Infinity, 2 ** -(octave + (Math.cos(angle) + 1) / 2)))))
    return Float64Array.from({ length: nodeCount }, (_, k) => {
      const sum = logs.reduce((total, log, n) => total + log * Math.cos(k * angles[n]!), 0)
      return (k === 0 ? 1 : 2) / nodeCount * sum
    })
  }
}

/** Σ c_k·T_k(x). */
function clenshaw(coefficients: Float64Array, x: number): number {
  let [ahead, behind] = [0, 0]
  for (let k = coefficients.length - 1; k > 0; k--) [ahead, behind] = [2 * x * ahead - behind + coefficients[k]!, ahead]
  return x * ahead - behind + coefficients[0]!
}
