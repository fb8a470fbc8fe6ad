/**
 * Word n of the binary reflected Gray code, which is best for PAM and PSK at useful SNR.
 * @see Agrell, Lassing, Ström, Ottosson, "On the optimality of the binary reflected Gray code", IEEE Trans. Inf. Theory 50 (2004)
 */
export function grayWord(n: number): number {
  return n ^ n >> 1
}

/** PAM from its lowest point up, as IEEE 802.11 labels an axis: −3, −1, 1, 3 are 00, 01, 11, 10. */
export function pamWords(order: number): number[] {
  return Array.from({ length: order }, (_, i) => grayWord(i))
}

/**
 * PSK counterclockwise from angle 0. Four points are the QPSK of 3GPP TS 38.211 §5.1.3 turned by −45°, one bit an axis:
 * 00, 10, 11, 01; others follow the reflected code.
 */
export function pskWords(order: number): number[] {
  return order === 4 ? [0b00, 0b10, 0b11, 0b01] : pamWords(order)
}
