import type { Issue } from '../errors'

export type FamilyId = 'pam' | 'psk' | 'qam' | 'cross-qam' | 'apsk' | 'hexagonal' | 'custom'
  | 'orthogonal' | 'biorthogonal' | 'simplex' | 'hypercube' | 'lattice' | 'product'
export type FamilyParameter = 'order' | 'rings' | 'ratios' | 'phases' | 'points' | 'lattice' | 'offset' | 'factors'
export type LatticeId = 'A2' | 'D4' | 'E8'

/** Parameters of a family; each family reads its own and ignores the others, so that a change of family loses nothing. */
export interface FamilyParameters {
  /** number of points M */
  order?: number | null
  /** APSK: points on each ring, the innermost first */
  rings?: readonly number[] | null
  /** APSK: radius of each further ring over that of the first ring of more than one point */
  ratios?: readonly number[] | null
  /** APSK: angle of each ring's first point, radians; left out: π/n_q */
  phases?: readonly number[] | null
  /** custom: M points of N coordinates, signal units */
  points?: readonly (readonly number[])[] | null
  /** lattice: which one */
  lattice?: LatticeId | null
  /** lattice: centre of the cut, in minimum distances; left out: a lattice point */
  offset?: readonly number[] | null
  /** product: its factors, 2 to 8, not nested */
  factors?: readonly ({ family: FamilyId } & FamilyParameters)[] | null
}

/** The rule that generates a constellation: one file each, listed in index.ts. */
export interface Family {
  id: FamilyId
  /** as shown, e.g. "Cross QAM" */
  title: string
  /** what orders are allowed, one sentence */
  orders: string
  /** the parameters that the family reads */
  parameters: readonly FamilyParameter[]
  /** what is wrong with parameters; empty when nothing is */
  validate: (parameters: FamilyParameters) => Issue[]
  /** the points, not yet scaled; parameters are valid */
  points: (parameters: FamilyParameters) => number[][]
  /** short name of a member, e.g. "16-QAM" or "4+12-APSK 2.57" */
  signature: (parameters: FamilyParameters) => string
}

/** The issue of an order that a family does not have, or none. */
export function orderIssues(allowed: boolean, sentence: string): Issue[] {
  return allowed ? [] : [{ path: ['order'], message: sentence }]
}

/** Whether a value is a whole number of a range. */
export function isWhole(value: unknown, from: number, to: number): value is number {
  return Number.isInteger(value) && (value as number) >= from && (value as number) <= to
}
