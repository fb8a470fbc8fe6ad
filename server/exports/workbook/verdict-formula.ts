import { verdictKinds } from '#shared/modulation/verdict'
import type { CandidateValues } from '#shared/schemas/values'
import type { MustHave, MustHaveKind } from '#shared/schemas/requirements'
import { byId, exactId } from './candidates-layout'
import { holdsFormula, slackFormula } from './rounding-formulas'
import type { SummaryCells } from './summary-cells'

/** Columns whose cell is what a must-have limits. */
const judgedColumns = { margin: 'margin', netBitRate: 'netRate', occupiedBandwidth: 'occupiedBandwidth', spectralEfficiency: 'spectralEfficiency', papr: 'papr' } as const

/** Digits that a shortfall is shown with (it rounds up): as many as the kind has, or as many as leave more than nought to the nearest. */
const digitsFormula = (by: string, digits: number) => `MIN(12,MAX(${digits},-INT(LOG10(-2*${by}))))`

type Cell = (id: string) => string

function shortfall(kind: MustHaveKind, cell: Cell): string {
  const { words, unit, digits, sense } = verdictKinds[kind]
  const value = cell(judgedColumns[kind])
  if (kind === 'margin') {
    const deciding = cell('decidingCase')
    return `": ${words} "&FIXED(-${cell('surplus')},${digits},TRUE)&" ${unit} short at "&IF(${value}<0,"−","+")&FIXED(ABS(${value}),${digits},TRUE)&" ${unit}"`
      + `&IF(${deciding}="",""," ("&${deciding}&")")`
  }
  const by = cell(byId({ kind }))
  const shown = digitsFormula(by, digits)
  return `": ${words} "&FIXED(ROUNDUP(-${by}-${slackFormula(by)},${shown}),${shown},TRUE)&" ${unit} ${sense === 'atLeast' ? 'short' : 'over'} at "&FIXED(${value},${shown},TRUE)&" ${unit}"`
}

/**
 * The verdict's words as a formula over the row's own unrounded cells and the summary's limits, in the words of shared/modulation/verdict.ts.
 * @returns null where nothing is judged
 */
export function verdictFormula(values: CandidateValues, cell: Cell, mustHaves: readonly MustHave[], summary: SummaryCells): string | null {
  const parts = mustHaves.flatMap(({ kind }) => {
    const limit = summary.mustHaves.get(kind)
    if (!limit) return []
    if (kind === 'papr' && values.paprDb === null) {
      return [{ holds: 'FALSE', words: `"; "&${limit.id}&": ${verdictKinds[kind].words} is not known for this row"` }]
    }
    const holds = kind === 'margin' ? holdsFormula(cell(exactId('surplus')), cell('requiredMargin')) : holdsFormula(cell(byId({ kind })), limit.value)
    return [{ holds, words: `IF(${holds},"","; "&${limit.id}&${shortfall(kind, cell)})` }]
  })
  if (!parts.length) return null
  return `IF(AND(${parts.map(part => part.holds).join(',')}),"passes","fails "&MID(${parts.map(part => part.words).join('&')},3,2000))`
}
