import type { FamilyParameters } from '../families'

/** Labels of rings 4+12, each ring counterclockwise from 45° and 15°. ETSI EN 302 307-1, figure 11. */
const sixteen = {
  rings: '4+12',
  phases: [[Math.PI / 4], [Math.PI / 12]],
  words: [
    0b1100, 0b1110, 0b1111, 0b1101,
    0b0100, 0b0000, 0b1000, 0b1010, 0b0010, 0b0110, 0b0111, 0b0011, 0b1011, 0b1001, 0b0001, 0b0101,
  ],
}

/** Labels of rings 4+12+16, each ring counterclockwise from 45°, 15° and 0°. ETSI EN 302 307-1, figure 12. */
const thirtyTwo = {
  rings: '4+12+16',
  // The family's own phase of the outer ring, half a step on, keeps the order of labels.
  phases: [[Math.PI / 4], [Math.PI / 12], [0, Math.PI / 16]],
  words: [
    0b10001, 0b10101, 0b10111, 0b10011,
    0b10000, 0b00000, 0b00001, 0b00101, 0b00100, 0b10100, 0b10110, 0b00110, 0b00111, 0b00011, 0b00010, 0b10010,
    0b11000, 0b01000, 0b11001, 0b01001, 0b01101, 0b11101, 0b01100, 0b11100,
    0b11110, 0b01110, 0b11111, 0b01111, 0b01011, 0b11011, 0b01010, 0b11010,
  ],
}

/** Phases that differ by less are the same; radians. */
const samePhase = 1e-6

/**
 * The standard's labels where rings and phases are the standard's, whatever the ratios.
 * @returns words in the order of the family's points, or null for other rings
 */
export function standardRingWords({ rings, phases }: FamilyParameters): number[] | null {
  const standard = [sixteen, thirtyTwo].find(set => set.rings === rings?.join('+'))
  if (!standard) return null
  const alike = standard.phases.every((allowed, q) => {
    const phase = phases?.[q] ?? Math.PI / rings![q]!
    return allowed.some(angle => Math.abs(phase - angle) < samePhase)
  })
  return alike ? standard.words : null
}
