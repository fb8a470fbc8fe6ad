import type ExcelJS from 'exceljs'
import type { LinkCaseResult, PowerUnit } from '#shared/modulation'
import { linkCase } from '#shared/modulation'
import type { Available, LinkCase, Requirements } from '#shared/schemas/requirements'
import { requiredMarginOf } from '#shared/study/canonical-study'
import { fixedAddress } from './addresses'
import type { LinkCells } from './link-cells'
import { linkSheetName } from './link-cells'
import { lineColumns, writeLines } from './link-lines'
import type { Running } from './link-lines'
import { headerStyle, headingStyle, styleRow, titleStyle } from './styles'
import type { SummaryCells } from './summary-cells'

type LinkBudget = Extract<Available, { from: 'link' }>
type Live = { cell: string, value: number }

/** What a case comes to: dBHz, dBm/Hz, dB. */
interface CaseCells { name: string, cOverN0: Live, noiseDensityDbm: Live, requiredMargin: Live }

const bold: Partial<ExcelJS.Style> = { font: { bold: true } }
const nothing: Running = { level: null, noise: null }
const writeHeader = (sheet: ExcelJS.Worksheet, unit: PowerUnit) =>
  styleRow(sheet.addRow(['Line', 'Kind', 'Frequency, GHz', 'Distance, km', 'Noise figure, dB', 'Value', 'Unit', `Level after it, ${unit}`, 'Source']), headerStyle)

/** Adds a row of one value at the foot of a case. */
function writeFoot(sheet: ExcelJS.Worksheet, label: string, value: ExcelJS.CellValue, unit: string, style: Partial<ExcelJS.Style> = {}): string {
  const row = sheet.addRow([label])
  row.getCell(lineColumns.value).value = value
  row.getCell(lineColumns.unit).value = unit
  styleRow(row, style)
  return `F${row.number}`
}

/** Lines that all cases share: they stand here alone. */
function writeCommon(sheet: ExcelJS.Worksheet, { steps, unit }: LinkCaseResult, count: number): Running {
  if (count === 0) return nothing
  styleRow(sheet.addRow(['Common lines of all cases']), headingStyle)
  writeHeader(sheet, unit)
  const running = writeLines(sheet, steps.slice(0, count), unit, nothing)
  sheet.addRow([])
  return running
}

/** Noise density of the common lines in the unit of a case: another than theirs only where the power is a line of each case. */
const inUnit = (noise: Running['noise'], from: PowerUnit, to: PowerUnit): Running['noise'] => {
  if (!noise || from === to) return noise
  return to === 'dBW' ? { cell: `(${noise.cell}-30)`, value: noise.value - 30 } : { cell: `(${noise.cell}+30)`, value: noise.value + 30 }
}

interface Shared { common: Running, unit: PowerUnit, summary: SummaryCells, studyMarginDb: number }

function writeCase(sheet: ExcelJS.Worksheet, item: LinkCase, result: LinkCaseResult, { common, unit, summary, studyMarginDb }: Shared): CaseCells {
  styleRow(sheet.addRow([`Case: ${item.name}`]), headingStyle)
  writeHeader(sheet, result.unit)
  if (common.level) {
    const row = sheet.addRow(['After the common lines'])
    row.getCell(lineColumns.level).value = { formula: common.level.cell, result: common.level.value }
  }
  const start = { level: common.level, noise: inUnit(common.noise, unit, result.unit) }
  const { level, noise } = writeLines(sheet, result.steps.slice(result.steps.length - item.lines.length), result.unit, start)
  if (!level || !noise) throw new Error(`The link case ${item.name} lacks its power or its noise line.`)
  const cOverN0 = writeFoot(sheet, 'C/N0', { formula: `${level.cell}-${noise.cell}`, result: result.cOverN0DbHz }, 'dBHz', bold)
  const value = item.requiredMarginDb ?? studyMarginDb
  const study = summary.mustHaves.get('margin')?.value
  const requiredMargin = writeFoot(sheet, 'Required margin', item.requiredMarginDb === null && study ? { formula: study, result: value } : value, 'dB')
  sheet.addRow([])
  return {
    name: item.name,
    cOverN0: { cell: cOverN0, value: result.cOverN0DbHz },
    noiseDensityDbm: { cell: result.unit === 'dBW' ? `${noise.cell}+30` : noise.cell, value: result.noiseDensityDbmHz },
    requiredMargin: { cell: requiredMargin, value },
  }
}

/** Fills the rows kept free at the top: what the cases come to, and below them the one that decides, whichever that becomes. */
function fillCases(rows: ExcelJS.Row[], decides: ExcelJS.Row, cases: CaseCells[]): LinkCells {
  const above = (item: CaseCells) => item.cOverN0.value - item.requiredMargin.value
  cases.forEach((item, i) => {
    const row = rows[i]!
    const live = [item.cOverN0, item.noiseDensityDbm, item.requiredMargin, { cell: `B${row.number}-D${row.number}`, value: above(item) }]
    row.values = [item.name, ...live.map(({ cell, value }) => ({ formula: cell, result: value }))]
  })
  const worst = cases.reduce((least, item) => above(item) < above(least) ? item : least)
  const span = (letter: string) => `$${letter}$${rows[0]!.number}:$${letter}$${rows.at(-1)!.number}`
  const chosen = (letter: string, result: number | string) => ({ formula: `INDEX(${span(letter)},MATCH(MIN(${span('E')}),${span('E')},0))`, result })
  decides.values = [
    chosen('A', worst.name), chosen('B', worst.cOverN0.value), chosen('C', worst.noiseDensityDbm.value), chosen('D', worst.requiredMargin.value),
    chosen('E', above(worst)), '← decides: the least of the last column is the worst surplus of every candidate',
  ]
  for (const row of [...rows, decides]) for (const column of [2, 3, 4, 5]) row.getCell(column).numFmt = '0.00'
  styleRow(decides, bold)
  const cell = (column: number) => fixedAddress(linkSheetName, column, decides.number)
  return { from: 'link', decidingCase: cell(1), cOverN0: cell(2), noiseDensity: cell(3), requiredMargin: cell(4) }
}

function writeBudget(sheet: ExcelJS.Worksheet, { lines, cases }: LinkBudget, summary: SummaryCells, studyMarginDb: number): LinkCells {
  styleRow(sheet.addRow(['Case', 'C/N0, dBHz', 'Noise density, dBm/Hz', 'Required margin, dB', 'C/N0 less required margin, dBHz']), headerStyle)
  const rows = cases.map(item => sheet.addRow([item.name]))
  const decides = sheet.addRow([''])
  sheet.addRow([])
  const results = cases.map(item => linkCase([...lines, ...item.lines]))
  const { unit } = results[0]!
  const common = writeCommon(sheet, results[0]!, lines.length)
  return fillCases(rows, decides, cases.map((item, i) => writeCase(sheet, item, results[i]!, { common, unit, summary, studyMarginDb })))
}

/**
 * The link budget as lines in dB, the common ones once, their levels and C/N0 computed by the sheet itself; or what is entered instead.
 * The sheet is small and is written as a whole: its first rows refer to its last.
 * @returns addresses that the candidates' formulas refer to
 */
export function writeLinkSheet(workbook: ExcelJS.stream.xlsx.WorkbookWriter, requirements: Requirements, summary: SummaryCells): LinkCells {
  const { available } = requirements
  const sheet = workbook.addWorksheet(linkSheetName)
  sheet.columns = [30, 16, 15, 13, 18, 12, 10, 18, 40].map(width => ({ width }))
  for (const index of [lineColumns.value, lineColumns.level]) sheet.getColumn(index).numFmt = '0.00'
  styleRow(sheet.addRow(['Link cases']), titleStyle)
  const value = fixedAddress(linkSheetName, lineColumns.value, 2)
  let cells: LinkCells
  if (available.from === 'link') {
    cells = writeBudget(sheet, available, summary, requiredMarginOf(requirements))
  } else if (available.from === 'entered') {
    sheet.addRow(['Available Es/N0 as entered', null, null, null, null, available.esN0Db, 'dB'])
    cells = { from: 'entered', esN0: value }
  } else {
    sheet.addRow(['N0 in signal units squared', null, null, null, null, available.n0]).getCell(lineColumns.value).numFmt = 'General'
    cells = { from: 'noiseDensity', n0: value }
  }
  sheet.commit()
  return cells
}
