import { linkCase } from '../modulation/link'
import type { MustHaveKind, Requirements, TargetQuantity } from '../schemas/requirements'

/** A link case as a row sees it: what its lines come to. */
export interface CanonicalCase {
  id: string
  name: string
  requiredMarginDb: number
  cOverN0DbHz: number
  noiseDensityDbmHz: number
}

/** What a row's result depends on of its study: neither names of lines nor reasons. */
export interface CanonicalStudy {
  /** error rate to meet */
  target: { quantity: TargetQuantity, value: number }
  mustHaves: { id: string, kind: MustHaveKind, value: number }[]
  /** symbol/s, Hz or bit/s by kind */
  heldConstant: { kind: Requirements['heldConstant']['kind'], value: number }
  limitedBy: Requirements['limitedBy']
  overhead: number
  dimensionsPerInterval: number
  available: { from: 'entered', esN0Db: number } | { from: 'noiseDensity', n0: number } | { from: 'link', cases: CanonicalCase[] }
}

/** Required margin of a study, dB: its must-have, or none. */
export function requiredMarginOf({ mustHaves }: { mustHaves: readonly { kind: MustHaveKind, value: number }[] }): number {
  return mustHaves.find(mustHave => mustHave.kind === 'margin')?.value ?? 0
}

function canonicalAvailable(requirements: Requirements): CanonicalStudy['available'] {
  const { available } = requirements
  if (available.from === 'entered') return { from: 'entered', esN0Db: available.esN0Db }
  if (available.from === 'noiseDensity') return { from: 'noiseDensity', n0: available.n0 }
  return {
    from: 'link',
    cases: available.cases.map(({ id, name, requiredMarginDb, lines }) => {
      const { cOverN0DbHz, noiseDensityDbmHz } = linkCase([...available.lines, ...lines])
      return { id, name, requiredMarginDb: requiredMarginDb ?? requiredMarginOf(requirements), cOverN0DbHz, noiseDensityDbmHz }
    }),
  }
}

const known = new WeakMap<Requirements, CanonicalStudy>()

/**
 * The study's part of canonical inputs; the same object for the same requirements object, so that many rows share it.
 * @throws ModulationError when a link case's lines contradict each other, in the words of the link budget
 */
export function canonicalStudy(requirements: Requirements): CanonicalStudy {
  let study = known.get(requirements)
  if (!study) {
    const { target, mustHaves, heldConstant, limitedBy, overhead, dimensionsPerInterval } = requirements
    study = {
      target: { quantity: target.quantity, value: target.value },
      mustHaves: mustHaves.map(({ id, kind, value }) => ({ id, kind, value })),
      heldConstant: { kind: heldConstant.kind, value: heldConstant.value * 1e6 },
      limitedBy, overhead, dimensionsPerInterval,
      available: canonicalAvailable(requirements),
    }
    known.set(requirements, study)
  }
  return study
}
