import { ModulationError } from './errors'

/**
 * Probability that a frame of uncoded symbols with independent errors holds at least one: −expm1(n·log1p(−P)).
 * @param symbolErrorRate P, 0 or more; a bound above 1 counts as 1
 * @param symbols n, whole, from 1
 * @returns probability
 * @throws ModulationError with path ['frameSymbols'] when n is no whole number from 1
 * @see methods §6
 */
export function frameErrorRate(symbolErrorRate: number, symbols: number): number {
  if (!(Number.isSafeInteger(symbols) && symbols >= 1)) throw new ModulationError('A frame has a whole number of symbols, from 1.', ['frameSymbols'])
  return symbolErrorRate >= 1 ? 1 : -Math.expm1(symbols * Math.log1p(-symbolErrorRate))
}
