/** sRGB from 0 to 255 */
export type Colour = [number, number, number]
type Triple = readonly [number, number, number]

const linear = (value: number) => value / 255 <= 0.04045 ? value / 255 / 12.92 : ((value / 255 + 0.055) / 1.055) ** 2.4
const product = (matrix: readonly Triple[], [a, b, c]: Triple): Triple => {
  const [x, y, z] = matrix.map(row => row[0] * a + row[1] * b + row[2] * c)
  return [x!, y!, z!]
}

/** Machado, Oliveira and Fernandes 2009, severity 1, on linear RGB */
const sights = {
  normal: [[1, 0, 0], [0, 1, 0], [0, 0, 1]],
  protanopia: [[0.152286, 1.052583, -0.204868], [0.114503, 0.786281, 0.099216], [-0.003882, -0.048116, 1.051998]],
  deuteranopia: [[0.367322, 0.860646, -0.227968], [0.280085, 0.672501, 0.047413], [-0.01182, 0.04294, 0.968881]],
} as const satisfies Record<string, readonly Triple[]>

/** A colour as a reader sees it, in OKLab (Ottosson 2020). */
export function seen(colour: Colour, sight: keyof typeof sights): Triple {
  const rgb = colour.map(linear) as Colour
  const [r, g, b] = product(sights[sight], rgb).map(part => Math.min(1, Math.max(0, part))) as Colour
  const cones = product([
    [0.4122214708, 0.5363325363, 0.0514459929], [0.2119034982, 0.6806995451, 0.1073969566], [0.0883024619, 0.2817188376, 0.6299787005],
  ], [r, g, b]).map(Math.cbrt) as Colour
  return product([
    [0.2104542553, 0.793617785, -0.0040720468], [1.9779984951, -2.428592205, 0.4505937099], [0.0259040371, 0.7827717662, -0.808675766],
  ], cones)
}

/** Distance of two colours in OKLab. */
export const distance = (a: Triple, b: Triple) => Math.hypot(a[0] - b[0], a[1] - b[1], a[2] - b[2])

const luminance = (colour: Colour) => 0.2126 * linear(colour[0]) + 0.7152 * linear(colour[1]) + 0.0722 * linear(colour[2])

/** Contrast ratio of WCAG 2. */
export function contrast(a: Colour, b: Colour): number {
  const [dark, light] = [luminance(a), luminance(b)].sort((x, y) => x - y) as [number, number]
  return (light + 0.05) / (dark + 0.05)
}
