import { ticks } from 'd3'

/** A place on an axis; only places with a label carry a grid line. */
export type Tick = { at: number, label: string | null }
/** A tick in a drawing: where on its axis and how long it is, in pixels. */
export type DrawnTick = Tick & { px: number, length: number }

const superscripts: Record<string, string> = {
  '-': '⁻', '0': '⁰', '1': '¹', '2': '²', '3': '³', '4': '⁴', '5': '⁵', '6': '⁶', '7': '⁷', '8': '⁸', '9': '⁹',
}

/** A power of ten as it is written by hand, such as 10⁻⁶. */
export function powerOfTen(exponent: number): string {
  return `10${[...String(exponent)].map(sign => superscripts[sign]).join('')}`
}

/** A positive number as a multiple of a power of ten, to three digits: 2.5·10⁻⁷, 10⁻⁶. */
export function scientificText(value: number): string {
  const [digits = '1', exponent = '0'] = value.toPrecision(3).includes('e') || value < 1
    ? value.toExponential(2).split('e')
    : [String(Number(value.toPrecision(3)))]
  const multiple = String(Number(digits))
  const power = Number(exponent)
  if (power === 0) return multiple
  return multiple === '1' ? powerOfTen(power) : `${multiple}·${powerOfTen(power)}`
}

/**
 * Ticks of a linear axis at round steps.
 * @param room length of the axis in pixels; a label takes about 60 of them
 */
export function linearTicks(low: number, high: number, room: number, each = 60): Tick[] {
  const places = ticks(low, high, Math.max(2, Math.floor(room / each)))
  const step = (places[1] ?? 1) - (places[0] ?? 0)
  const digits = Math.max(0, -Math.floor(Math.log10(step) + 1e-9))
  return places.map(at => ({ at, label: (Math.abs(at) < step / 2 ? 0 : at).toFixed(digits).replace('-', '−') }))
}

/**
 * Ticks of an axis of powers of ten: labels at powers, as many as fit; between them plain ticks at 2 to 9 where there
 * is room, which get labels too once less than about a decade is in view.
 * @param low exponent at the axis's foot
 * @param high exponent at its head
 * @param room length of the axis in pixels
 */
export function decadeTicks(low: number, high: number, room: number): Tick[] {
  const decade = room / (high - low)
  const stride = [1, 2, 3, 5, 10, 20, 50, 100].find(n => n * decade >= 24) ?? 200
  const labelled = decade >= 480 ? [2, 3, 4, 5, 6, 7, 8, 9] : decade >= 130 ? [2, 5] : []
  const found: Tick[] = []
  for (let exponent = Math.floor(low); exponent <= Math.ceil(high); exponent++) {
    found.push({ at: exponent, label: exponent % stride === 0 ? powerOfTen(exponent) : null })
    for (let n = 2; n < 10 && decade >= 48; n++) {
      found.push({ at: exponent + Math.log10(n), label: labelled.includes(n) ? `${n}·${powerOfTen(exponent)}` : null })
    }
  }
  return found.filter(({ at }) => at >= low - 1e-9 && at <= high + 1e-9)
}
