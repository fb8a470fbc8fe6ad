import type { Requirements } from '#shared/schemas/requirements'
import type { CandidateValues } from '#shared/schemas/values'
import type { LinkCells } from './link-sheet'

/** Letters of the columns that formulas refer to. */
export type Letters = Record<'requiredEsN0' | 'netBits' | 'availableEsN0' | 'backOffValue' | 'symbolRate' | 'lossUsed' | 'margin' | 'requiredMargin', string>

/**
 * Cells of one candidate that the spreadsheet goes on computing, by column id.
 * Each refers to its own row and, for a link budget, to the deciding case's cells on the sheet of link cases.
 */
export function rowFormulas(values: CandidateValues, row: number, letters: Letters, requirements: Requirements, link: LinkCells): Record<string, string> {
  const cell = (id: keyof Letters) => `${letters[id]}${row}`
  const formulas: Record<string, string> = {}
  const { available, limitedBy } = requirements
  const deciding = available.from === 'link' ? available.cases.find(c => c.name === values.decidingCase) : undefined
  const cOverN0 = deciding && link.cOverN0.get(deciding.id)
  const requiredMargin = deciding && link.requiredMargin.get(deciding.id)
  if (cOverN0) {
    const backOff = limitedBy === 'peakPower' ? `-${cell('backOffValue')}` : ''
    formulas.availableEsN0 = `${cOverN0}${backOff}-10*LOG10(${cell('symbolRate')}*1E6)`
  }
  if (requiredMargin) formulas.requiredMargin = requiredMargin
  if (values.requiredEsN0Db !== null) {
    formulas.requiredEbN0 = `${cell('requiredEsN0')}-10*LOG10(${cell('netBits')})`
    formulas.margin = `${cell('availableEsN0')}-${cell('requiredEsN0')}-${cell('lossUsed')}`
    formulas.surplus = `${cell('margin')}-${cell('requiredMargin')}`
  }
  return formulas
}
