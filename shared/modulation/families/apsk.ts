import { maximalOrder } from '../constellation-checks'
import type { Issue } from '../errors'
import { onCircle } from './circle'
import { isWhole } from './family'
import type { Family, FamilyParameters } from './family'

const orders = 'APSK has rings of 1 or more points, 2 to 4096 points in all.'

/**
 * Amplitude and phase-shift keying: ring q has n_q points at radius ratio γ_q, the first at angle π/n_q unless given.
 * A first ring of a single point is the origin, and ratios then refer to the next ring; methods §12.
 */
export const apsk: Family = {
  id: 'apsk',
  title: 'APSK',
  orders,
  parameters: ['rings', 'ratios', 'phases'],
  validate: ({ rings, ratios, phases }) => {
    const wrongRings = ringIssues(rings)
    return wrongRings.length > 0 ? wrongRings : [...ratioIssues(rings!, ratios ?? []), ...phaseIssues(rings!, phases)]
  },
  points: (parameters) => {
    const radii = radiiOf(parameters)
    return parameters.rings!.flatMap((n, q) =>
      Array.from({ length: n }, (_, i) => onCircle(radii[q]!, i, n, parameters.phases?.[q] ?? Math.PI / n)))
  },
  signature: ({ rings, ratios }) =>
    `${(rings ?? []).join('+')}-APSK${ratios && ratios.length > 0 ? ` ${ratios.join('/')}` : ''}`,
}

/** Radii over that of the first ring of more than one point. */
function radiiOf({ rings, ratios }: FamilyParameters): number[] {
  return rings![0] === 1 ? [0, 1, ...ratios ?? []] : [1, ...ratios ?? []]
}

function ringIssues(rings: FamilyParameters['rings']): Issue[] {
  if (!Array.isArray(rings) || rings.length === 0) return [{ path: ['rings'], message: 'Rings are the numbers of points on each, the innermost first, such as 4+12.' }]
  const wrong = rings.findIndex((n, q) => !isWhole(n, q === 0 ? 1 : 2, maximalOrder))
  if (wrong === 0) return [{ path: ['rings', 0], message: 'The first ring has 1 (at the origin) to 4096 points.' }]
  if (wrong > 0) return [{ path: ['rings', wrong], message: 'A further ring has 2 to 4096 points.' }]
  const sum = rings.reduce((total: number, n: number) => total + n, 0)
  return isWhole(sum, 2, maximalOrder) ? [] : [{ path: ['rings'], message: orders }]
}

function ratioIssues(rings: readonly number[], ratios: readonly number[]): Issue[] {
  const count = rings.length - (rings[0] === 1 ? 2 : 1)
  if (ratios.length !== count) {
    const sentence = count === 0
      ? 'These rings have no ratio: leave it empty.'
      : `These rings have ${count} ${count === 1 ? 'ratio' : 'ratios'}: one for each ring outside the first of more than one point.`
    return [{ path: ['ratios'], message: sentence }]
  }
  const wrong = ratios.findIndex((ratio, n) => !(ratio > (ratios[n - 1] ?? 1) && ratio <= 1000))
  return wrong < 0 ? [] : [{ path: ['ratios', wrong], message: 'Ring ratios are above 1, up to 1,000, and grow outwards.' }]
}

function phaseIssues(rings: readonly number[], phases: FamilyParameters['phases']): Issue[] {
  if (!phases) return []
  if (phases.length !== rings.length) return [{ path: ['phases'], message: 'Phases are as many as rings.' }]
  const wrong = phases.findIndex(phase => !Number.isFinite(phase))
  return wrong < 0 ? [] : [{ path: ['phases', wrong], message: 'A phase is a finite number of radians.' }]
}
