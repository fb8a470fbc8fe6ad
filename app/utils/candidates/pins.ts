import { pinSlots } from '../pin-style'

/** The lowest slot of the overlay that no row has, or null when all are taken. */
export function freeSlot(taken: readonly (number | null)[]): number | null {
  for (let slot = 1; slot <= pinSlots; slot++) if (!taken.includes(slot)) return slot
  return null
}
