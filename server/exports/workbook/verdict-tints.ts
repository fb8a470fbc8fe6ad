import type ExcelJS from 'exceljs'
import { failTint, passTint } from './styles'

/** A fill of a conditional format: its solid colour stands in the background's place. */
const tint = (argb: string): Partial<ExcelJS.Style> => ({ fill: { type: 'pattern', pattern: 'solid', bgColor: { argb } } })

/**
 * Shades verdicts by their words, so that the tint follows a verdict that changes: teal where it passes, vermilion where it fails or
 * cannot be computed.
 * @param letter column of the verdicts
 * @param first row
 * @param last row, at least the first
 */
export function tintVerdicts(sheet: ExcelJS.Worksheet, letter: string, first: number, last: number): void {
  const begins = (word: string) => `LEFT($${letter}${first},${word.length})="${word}"`
  sheet.addConditionalFormatting({
    ref: `${letter}${first}:${letter}${last}`,
    rules: [
      { type: 'expression', priority: 1, formulae: [begins('passes')], style: tint(passTint) },
      { type: 'expression', priority: 2, formulae: [`OR(${begins('fails')},${begins('cannot')})`], style: tint(failTint) },
    ],
  })
}
