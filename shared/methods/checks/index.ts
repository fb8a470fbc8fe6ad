import type { MethodId } from '../index'
import { bitErrorChecks } from './bit-error'
import { channelChecks } from './channels'
import type { Check } from './check'
import { allowedOf, publishedOf } from './check'
import { energyChecks } from './energies'
import { gaussianChecks } from './gaussian'
import { geometryChecks } from './geometry'
import { informationChecks } from './information'
import { linkChecks } from './link'
import { phaseErrorChecks } from './phase-error'
import { spaceChecks } from './space'
import { symbolErrorChecks } from './symbol-error'

export { allowedOf, publishedOf } from './check'
export type { Check } from './check'

/** Every published value that the build is held against. A new one is an entry in the file of its subject. */
const all: readonly Check[] = [
  ...energyChecks, ...gaussianChecks, ...geometryChecks, ...spaceChecks, ...symbolErrorChecks, ...bitErrorChecks, ...informationChecks, ...channelChecks, ...phaseErrorChecks, ...linkChecks,
]

/** The checks with ids of their own: the method, and a number within it. */
export const checks: readonly (Check & { id: string })[] = (() => {
  const counts = new Map<MethodId, number>()
  return all.map((check) => {
    const count = (counts.get(check.method) ?? 0) + 1
    counts.set(check.method, count)
    return { ...check, id: `${check.method}-${count}` }
  })
})()

/** What a build computes for a check. */
export interface CheckOutcome {
  id: string
  published: number
  computed: number
  difference: number
  /** largest difference allowed, in the value's own unit */
  allowed: number
  holds: boolean
}

/** Computes every check: a second or so of work. */
export const checkOutcomes = (): CheckOutcome[] => checks.map((check) => {
  const [published, computed, allowed] = [publishedOf(check), check.compute(), allowedOf(check)]
  const difference = computed - published
  return { id: check.id, published, computed, difference, allowed, holds: Math.abs(difference) <= allowed }
})
