/**
 * What a command on rows acts on: the selected rows when the active row is among them, else the active row alone.
 * Rows that are not shown are never acted on.
 * @param selected ids of the selected rows, in any order
 * @param active id of the row with the focus, or null before there is one
 * @param order ids of the rows shown, from the first down
 * @returns ids in the order shown
 */
export function rowTargets(selected: readonly string[], active: string | null, order: readonly string[]): string[] {
  const chosen = new Set(selected)
  const alone = active !== null && !chosen.has(active) && order.includes(active)
  return alone ? [active] : order.filter(id => chosen.has(id))
}
