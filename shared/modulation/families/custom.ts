import { createConstellation } from '../constellation'
import { ModulationError } from '../errors'
import type { Family } from './family'

const orders = 'A custom constellation has 2 to 4096 points of 1 to 8 coordinates.'

/** Points of the user's own, taken as given. */
export const custom: Family = {
  id: 'custom',
  title: 'Custom',
  orders,
  parameters: ['points'],
  validate: ({ points }) => {
    try {
      createConstellation(points ?? [])
      return []
    } catch (error) {
      if (error instanceof ModulationError) return [{ path: error.path, message: error.message }]
      throw error
    }
  },
  points: ({ points }) => points!.map(point => [...point]),
  signature: ({ points }) => `Custom ${points?.length ?? 0}`,
}
