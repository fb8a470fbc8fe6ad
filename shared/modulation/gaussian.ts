import { ModulationError } from './errors'

/**
 * The Gaussian tail Q(x) = ½·erfc(x/√2), its logarithm and its inverse.
 * Rational approximations of erf and of the scaled complement exp(y²)·erfc(y):
 * W. J. Cody, "Rational Chebyshev approximations for the error function", Math. Comp. 23 (1969).
 */

const nearNumerator = [3.16112374387056560, 1.13864154151050156e2, 3.77485237685302021e2, 3.20937758913846947e3, 1.85777706184603153e-1] as const
const nearDenominator = [2.36012909523441209e1, 2.44024637934444173e2, 1.28261652607737228e3, 2.84423683343917062e3] as const
const middleNumerator = [5.64188496988670089e-1, 8.88314979438837594, 6.61191906371416295e1, 2.98635138197400131e2, 8.81952221241769090e2,
  1.71204761263407058e3, 2.05107837782607147e3, 1.23033935479799725e3, 2.15311535474403846e-8] as const
const middleDenominator = [1.57449261107098347e1, 1.17693950891312499e2, 5.37181101862009858e2, 1.62138957456669019e3, 3.29079923573345963e3,
  4.36261909014324716e3, 3.43936767414372164e3, 1.23033935480374942e3] as const
const farNumerator = [3.05326634961232344e-1, 3.60344899949804439e-1, 1.25781726111229246e-1, 1.60837851487422766e-2,
  6.58749161529837803e-4, 1.63153871373020978e-2] as const
const farDenominator = [2.56852019228982242, 1.87295284992346725, 5.27905102951428412e-1, 6.05183413124413191e-2, 2.33520497626869185e-3] as const
const inverseRootPi = 5.6418958354775628695e-1

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
