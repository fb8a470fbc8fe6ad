/**
 * Estimated seconds for the relevant neighbours of scattered points, by linear programmes, measured on a slow machine.
 * @param order number of points M
 * @param dimensions N; next to nothing in one and two
 */
export const geometrySeconds = (order: number, dimensions: number): number =>
  dimensions > 2 ? 3e-7 * order ** 2.4 * 2 ** (dimensions - 2) : 0
