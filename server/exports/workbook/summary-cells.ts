import type { MustHaveKind } from '#shared/schemas/requirements'

export const summarySheetName = 'Summary'

/** Cells of the summary that every other sheet takes the study's inputs from: each stands there once. */
export interface SummaryCells {
  /** by kind: where its value and its ID stand */
  mustHaves: Map<MustHaveKind, { value: string, id: string }>
  /** the quantity held constant, in its kind's unit */
  held: string
  /** mean power or peak power, in words */
  limitedBy: string
  overhead: string
  rollOff: string
  implementationLoss: string
  dimensionsPerInterval: string
}

/** Words of the summary's cell for what limits the amplifier; formulas compare with them. */
export const limitWords = { meanPower: 'mean power', peakPower: 'peak power' } as const
