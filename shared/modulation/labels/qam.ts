/**
 * QAM as 3GPP TS 38.211 §5.1.3 to §5.1.6 maps it, and larger or rectangular grids by the same rule: bits go to the two
 * coordinates in turn, the first to the horizontal one; a coordinate's first bit is its sign (0: positive), and each further
 * bit tells on which side of the middle of what is left its size lies (0: inside).
 * @param bits k, 2 to 12
 * @returns words in the order of the family's points: column after column, each from below
 */
export function qamWords(bits: number): number[] {
  const across = Math.ceil(bits / 2)
  const up = bits - across
  const rows = 2 ** up
  const horizontal = axisWords(across)
  const vertical = axisWords(up)
  return Array.from({ length: 2 ** bits }, (_, n) => interleaved(horizontal[Math.floor(n / rows)]!, across, vertical[n % rows]!, up))
}

/** Words of one coordinate, −(2^m − 1), …, 2^m − 1 in steps of 2. */
function axisWords(bits: number): number[] {
  const levels = 2 ** bits
  const words = new Array<number>(levels)
  for (let word = 0; word < levels; word++) words[(coordinateOf(word, bits) + levels - 1) / 2] = word
  return words
}

/** (1−2c0)·[2^(m−1) − (1−2c1)·[2^(m−2) − …·[2 − (1−2c_(m−1))]]], the odd integer of a word c0 c1 … . */
function coordinateOf(word: number, bits: number): number {
  let size = 0
  for (let place = 0; place < bits; place++) {
    const sign = 1 - 2 * (word >> place & 1)
    size = sign * (2 ** place - size)
  }
  return size
}

/** First bit of a, first of b, second of a, … ; a has as many bits as b or one more. */
function interleaved(a: number, bitsOfA: number, b: number, bitsOfB: number): number {
  let word = 0
  for (let n = 0; n < bitsOfA; n++) {
    word = word * 2 + (a >> bitsOfA - 1 - n & 1)
    if (n < bitsOfB) word = word * 2 + (b >> bitsOfB - 1 - n & 1)
  }
  return word
}
