import { ModulationError } from './errors'

/**
 * The Gaussian tail Q(x) = ½·erfc(x/√2), its logarithm and its inverse.
 * Rational approximations of erf and of the scaled complement exp(y²)·erfc(y):
 * W. J. Cody, "Rational Chebyshev approximations for the error function", Math. Comp. 23 (1969).
 */

const nearNumerator = [3.1611237438705655, 113.86415415105016, 377.485237685302, 3209.3775891384694, 0.18577770618460315] as const
const nearDenominator = [23.601290952344122, 244.02463793444417, 1282.6165260773723, 2844.236833439171] as const
const middleNumerator = [0.5641884969886701, 8.883149794388377, 66.11919063714163, 298.6351381974001, 881.952221241769,
  1712.0476126340707, 2051.0783778260716, 1230.3393547979972, 2.1531153547440383e-8] as const
const middleDenominator = [15.744926110709835, 117.6939508913125, 537.1811018620099, 1621.3895745666903, 3290.7992357334597,
  4362.619090143247, 3439.3676741437216, 1230.3393548037495] as const
const farNumerator = [0.30532663496123236, 0.36034489994980445, 0.12578172611122926, 0.016083785148742275,
  0.0006587491615298378, 0.016315387137302097] as const
const farDenominator = [2.568520192289822, 1.8729528499234673, 0.5279051029514285, 0.06051834131244132, 0.0023352049762686918] as const
const inverseRootPi = 0.5641895835477563

/** erf(y) for |y| ≤ 0.46875. */
function erfNear(y: number): number {
  const [p, r] = [nearNumerator, nearDenominator]
  const z = y * y
  let numerator = p[4] * z
  let denominator = z
  for (let i = 0; i < 3; i++) {
    numerator = (numerator + p[i]!) * z
    denominator = (denominator + r[i]!) * z
  }
  return y * (numerator + p[3]) / (denominator + r[3])
}

/** exp(y²)·erfc(y) for y ≥ 0.46875. */
function erfcScaled(y: number): number {
  if (y <= 4) {
    let numerator = middleNumerator[8] * y
    let denominator = y
    for (let i = 0; i < 7; i++) {
      numerator = (numerator + middleNumerator[i]!) * y
      denominator = (denominator + middleDenominator[i]!) * y
    }
    return (numerator + middleNumerator[7]) / (denominator + middleDenominator[7])
  }
  const z = 1 / (y * y)
  let numerator = farNumerator[5] * z
  let denominator = z
  for (let i = 0; i < 4; i++) {
    numerator = (numerator + farNumerator[i]!) * z
    denominator = (denominator + farDenominator[i]!) * z
  }
  const correction = z * (numerator + farNumerator[4]) / (denominator + farDenominator[4])
  return (inverseRootPi - correction) / y
}

/**
 * Gaussian tail probability.
 * @param x any number
 * @returns P(standard normal > x), relative error below 1e-12 for x from −5 to 37; 0 where it underflows
 * @see Abramowitz and Stegun, table 26.1; methods §10
 */
export function q(x: number): number {
  const y = Math.abs(x) * Math.SQRT1_2
  if (y <= 0.46875) return 0.5 - 0.5 * erfNear(x * Math.SQRT1_2)
  const tail = 0.5 * Math.exp(-x * x / 2) * erfcScaled(y)
  return x < 0 ? 1 - tail : tail
}

/**
 * Natural logarithm of Q(x), finite far beyond where Q itself underflows.
 * @param x any number
 */
export function logQ(x: number): number {
  if (x < 1) return Math.log(q(x))
  return -x * x / 2 + Math.log(0.5 * erfcScaled(x * Math.SQRT1_2))
}

/**
 * Inverse of the Gaussian tail: the x with Q(x) = p.
 * Starts from Abramowitz and Stegun 26.2.23 and takes Newton steps on ln Q, whose slope never vanishes.
 * @param p probability, above 0 and below 1
 * @throws ModulationError when p is outside
 */
export function qInverse(p: number): number {
  if (!(p > 0 && p < 1)) throw new ModulationError('A probability is above 0 and below 1.', ['p'])
  if (p === 0.5) return 0
  if (p > 0.5) return -qInverse(1 - p)
  const t = Math.sqrt(-2 * Math.log(p))
  let x = t - (2.515517 + t * (0.802853 + t * 0.010328)) / (1 + t * (1.432788 + t * (0.189269 + t * 0.001308)))
  for (let i = 0; i < 4; i++) {
    const value = logQ(x)
    const slope = -Math.exp(-x * x / 2 - value) / Math.sqrt(2 * Math.PI)
    x -= (value - Math.log(p)) / slope
  }
  return x
}
