/** Rings, ratios and phases of a published APSK constellation. */
export interface ApskPreset {
  title: string
  /** code rate that the ratios belong to, as in the standard */
  codeRate: string
  rings: readonly number[]
  ratios: readonly number[]
  /** radians */
  phases: readonly number[]
}

const sixteen: [string, number][] = [['2/3', 3.15], ['3/4', 2.85], ['4/5', 2.75], ['5/6', 2.70], ['8/9', 2.60], ['9/10', 2.57]]
const thirtyTwo: [string, number, number][] = [
  ['3/4', 2.84, 5.27], ['4/5', 2.72, 4.87], ['5/6', 2.64, 4.64], ['8/9', 2.54, 4.33], ['9/10', 2.53, 4.30],
]

/**
 * 16-APSK (4+12) and 32-APSK (4+12+16) by code rate.
 * Inner and middle ring start at 45° and 15°, the outer ring of 32-APSK has a point at 0°.
 * @see ETSI EN 302 307-1, tables 9 and 10, figures 11 and 12
 */
export const apskPresets: readonly ApskPreset[] = [
  ...sixteen.map(([codeRate, ratio]) => ({
    title: `16-APSK ${codeRate}`, codeRate, rings: [4, 12], ratios: [ratio], phases: [Math.PI / 4, Math.PI / 12],
  })),
  ...thirtyTwo.map(([codeRate, middle, outer]) => ({
    title: `32-APSK ${codeRate}`, codeRate, rings: [4, 12, 16], ratios: [middle, outer], phases: [Math.PI / 4, Math.PI / 12, 0],
  })),
]
