/**
 * Point i of n on a circle, at angle 2πi/n + phase. Angles are first brought to an eighth of the circle,
 * so that points that mirror each other have equal coordinates to the last bit when the phase is 0 or π/n.
 */
export function onCircle(radius: number, i: number, n: number, phase: number): number[] {
  const turn = phase === Math.PI / n ? (2 * i + 1) / (2 * n) : phase === 0 ? i / n : NaN
  if (Number.isNaN(turn)) {
    const angle = 2 * Math.PI * i / n + phase
    return [radius * Math.cos(angle), radius * Math.sin(angle)]
  }
  const eighths = Math.round(turn * 8)
  const quarter = Math.floor(eighths / 2)
  const rest = turn - quarter / 4
  const [c, s] = eighths % 2 === 0
    ? [Math.cos(2 * Math.PI * rest), Math.sin(2 * Math.PI * rest)]
    : [Math.sin(2 * Math.PI * (0.25 - rest)), Math.cos(2 * Math.PI * (0.25 - rest))]
  const [x, y] = [[c, s], [-s, c], [-c, -s], [s, -c]][quarter % 4]!
  return [radius * x!, radius * y!]
}
