import { ModulationError } from './errors'
import type { FamilyId, FamilyParameters } from './families'
import { familyOf } from './families'
import { latticeDimensions } from './families/lattice-cut'

/** Parameters that may be searched. */
export const freeParameters = ['ratios', 'phases', 'offset', 'points'] as const
export type FreeParameter = (typeof freeParameters)[number]

/** Least and largest value of every number of a parameter: ratios, radians, minimum distances, signal units. */
export type SearchBounds = Partial<Record<FreeParameter, readonly [number, number]>>

/** One number that is searched. */
export interface Variable {
  parameter: FreeParameter
  /** which of the parameter's numbers; a point's coordinates follow each other */
  index: number
  low: number
  high: number
}

/** Ring ratios are searched from here to here unless told otherwise. */
const ratioBounds = [1.02, 12] as const
/** Coordinates of points are searched so far about their start, in r.m.s. amplitudes of the points. */
const pointReach = 1.5

/**
 * The numbers to search, with their bounds. What only turns or scales the whole set is left out: the first phase of several, and of free points the one
 * farthest from the origin.
 * @param parameters the start, complete: valid for the family
 * @throws ModulationError naming the parameter that the family lacks or that has no start, or the bounds that leave the start out
 */
export function variablesOf(family: FamilyId, parameters: FamilyParameters, free: readonly FreeParameter[], bounds: SearchBounds): Variable[] {
  const known = familyOf(family).parameters
  const variables = free.flatMap((parameter) => {
    if (!known.includes(parameter)) throw new ModulationError(`${familyOf(family).title} has no ${parameter} to search.`, ['free'])
    const numbers = numbersOf(parameters, parameter)
    const held = heldOf(parameters, parameter)
    return numbers.flatMap((start, index): Variable[] => {
      if (held(index)) return []
      const [low, high] = bounds[parameter] ?? defaultBounds(parameters, parameter, index, start)
      if (!(low < high && start >= low && start <= high)) {
        throw new ModulationError(`Bounds rise, and the start lies within them: ${Number(start.toPrecision(4))} does not.`, ['bounds', parameter])
      }
      return [{ parameter, index, low, high }]
    })
  })
  if (variables.length === 0) throw new ModulationError('Nothing is left to search: choose ratios, phases, an offset or points with more than one free number.', ['free'])
  return variables
}

/** The parameters with phases and offsets that the family otherwise supplies. */
export function completed(parameters: FamilyParameters, free: readonly FreeParameter[]): FamilyParameters {
  const { rings, phases, lattice, offset } = parameters
  return {
    ...parameters,
    ...free.includes('phases') && !phases && rings ? { phases: rings.map(n => Math.PI / n) } : {},
    ...free.includes('offset') && !offset?.length && lattice ? { offset: new Array<number>(latticeDimensions[lattice]).fill(0) } : {},
  }
}

/** Where the parameters lie between the bounds, 0 to 1 each. */
export function placeOf(variables: readonly Variable[], parameters: FamilyParameters): number[] {
  return variables.map(({ parameter, index, low, high }) => (numbersOf(parameters, parameter)[index]! - low) / (high - low))
}

/** The parameters at a place between the bounds. */
export function parametersAt(variables: readonly Variable[], parameters: FamilyParameters, place: readonly number[]): FamilyParameters {
  const result: FamilyParameters = { ...parameters }
  for (const parameter of new Set(variables.map(variable => variable.parameter))) {
    const numbers = numbersOf(parameters, parameter)
    variables.forEach(({ parameter: own, index, low, high }, n) => {
      if (own === parameter) numbers[index] = low + (high - low) * place[n]!
    })
    if (parameter !== 'points') result[parameter] = numbers
    else result.points = parameters.points!.map((point, i) => point.map((_, n) => numbers[i * point.length + n]!))
  }
  return result
}

function numbersOf(parameters: FamilyParameters, parameter: FreeParameter): number[] {
  const numbers = parameter === 'points' ? parameters.points?.flat() : parameters[parameter]
  if (!numbers?.length) throw new ModulationError(`A search begins at given values: enter ${parameter === 'offset' ? 'an offset' : parameter}.`, [parameter])
  return [...numbers]
}

function heldOf(parameters: FamilyParameters, parameter: FreeParameter): (index: number) => boolean {
  if (parameter === 'phases') {
    const turning = parameters.rings!.findIndex(n => n > 1)
    return index => index <= turning
  }
  if (parameter !== 'points') return () => false
  const energies = parameters.points!.map(point => point.reduce((sum, x) => sum + x * x, 0))
  const farthest = energies.indexOf(Math.max(...energies))
  return index => Math.floor(index / parameters.points![0]!.length) === farthest
}

function defaultBounds(parameters: FamilyParameters, parameter: FreeParameter, index: number, start: number): readonly [number, number] {
  switch (parameter) {
    case 'ratios': return [Math.min(start, ratioBounds[0]), Math.max(start, ratioBounds[1])]
    // A ring of n points repeats after 2π/n.
    case 'phases': return [start - Math.PI / parameters.rings![index]!, start + Math.PI / parameters.rings![index]!]
    case 'offset': return [Math.min(start, -1), Math.max(start, 1)]
    case 'points': {
      const rms = Math.sqrt(parameters.points!.reduce((sum, point) => sum + point.reduce((energy, x) => energy + x * x, 0), 0) / parameters.points!.length)
      return [start - pointReach * rms, start + pointReach * rms]
    }
  }
}
