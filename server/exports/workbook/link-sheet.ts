import type ExcelJS from 'exceljs'
import type { LinkCaseResult, LinkStep } from '#shared/modulation'
import { boltzmann, linkCase, referenceTemperature, speedOfLight } from '#shared/modulation'
import type { Available, LinkCase } from '#shared/schemas/requirements'
import { fixedAddress } from './addresses'
import { headerStyle, headingStyle, styleRow, titleStyle } from './styles'

export const linkSheetName = 'Link cases'

/** Cells that the candidates' formulas refer to, by case. */
export interface LinkCells {
  cOverN0: Map<string, string>
  requiredMargin: Map<string, string>
}

const columns = { name: 1, kind: 2, frequency: 3, distance: 4, noiseFigure: 5, value: 6, unit: 7, level: 8, source: 9 }
const kinds = { power: 'power', gain: 'gain', loss: 'loss', freeSpaceLoss: 'free-space loss', noiseFigure: 'noise density' }
/** In formulas the exponent's letter is a capital. */
const boltzmannText = String(boltzmann).toUpperCase()
const lossConstant = `20*LOG10(4*PI()*1E12/${speedOfLight})`

/** Value of a line: typed lines are formulas over their own inputs, so that the sheet goes on computing. */
function valueCell({ line, valueDb }: LinkStep, row: number, unit: string): ExcelJS.CellValue {
  switch (line.kind) {
    case 'freeSpaceLoss':
      return { formula: `${lossConstant}+20*LOG10(C${row})+20*LOG10(D${row})`, result: valueDb }
    case 'noiseFigure':
      return { formula: `10*LOG10(${boltzmannText}*${referenceTemperature}${unit === 'dBm' ? '*1000' : ''})+E${row}`, result: valueDb }
    default: return valueDb
  }
}

const signs = { power: '+', gain: '+', loss: '-', freeSpaceLoss: '-' } as const

function writeSteps(sheet: ExcelJS.Worksheet, result: LinkCaseResult) {
  let levelRow = 0
  let noiseRow = 0
  for (const step of result.steps) {
    const { line } = step
    const row = sheet.addRow([line.name, kinds[line.kind]])
    const number = row.number
    if (line.kind === 'freeSpaceLoss') {
      row.getCell(columns.frequency).value = line.frequencyGhz
      row.getCell(columns.distance).value = line.distanceKm
    }
    if (line.kind === 'noiseFigure') row.getCell(columns.noiseFigure).value = line.noiseFigureDb
    row.getCell(columns.value).value = valueCell(step, number, result.unit)
    row.getCell(columns.unit).value = line.kind === 'noiseFigure' ? `${result.unit}/Hz` : line.kind === 'power' ? result.unit : 'dB'
    if (line.kind === 'noiseFigure') {
      noiseRow = number
    } else {
      const formula = levelRow ? `H${levelRow}${signs[line.kind]}F${number}` : `${signs[line.kind] === '-' ? '-' : ''}F${number}`
      row.getCell(columns.level).value = { formula, result: step.levelDb ?? undefined }
      levelRow = number
    }
    row.getCell(columns.source).value = line.source
    row.commit()
  }
  return { levelRow, noiseRow }
}

function writeCase(sheet: ExcelJS.Worksheet, item: LinkCase, common: LinkCase['lines'], requiredMarginDb: number, cells: LinkCells) {
  const result = linkCase([...common, ...item.lines])
  styleRow(sheet.addRow([`Case: ${item.name}`]), headingStyle).commit()
  styleRow(sheet.addRow(['Line', 'Kind', 'Frequency, GHz', 'Distance, km', 'Noise figure, dB', 'Value', 'Unit', `Level after it, ${result.unit}`, 'Source']), headerStyle).commit()
  const { levelRow, noiseRow } = writeSteps(sheet, result)

  const density = sheet.addRow(['C/N0'])
  density.getCell(columns.value).value = { formula: `H${levelRow}-F${noiseRow}`, result: result.cOverN0DbHz }
  density.getCell(columns.unit).value = 'dBHz'
  cells.cOverN0.set(item.id, fixedAddress(linkSheetName, columns.value, density.number))
  styleRow(density, { font: { bold: true } }).commit()

  const margin = sheet.addRow(['Required margin'])
  margin.getCell(columns.value).value = requiredMarginDb
  margin.getCell(columns.unit).value = 'dB'
  cells.requiredMargin.set(item.id, fixedAddress(linkSheetName, columns.value, margin.number))
  margin.commit()
  sheet.addRow([]).commit()
}

/**
 * Link cases as lines in dB, their levels and C/N0 computed by the sheet itself.
 * @param studyMarginDb required margin where a case has none of its own, dB
 * @returns addresses of each case's C/N0 and required margin
 */
export function writeLinkSheet(workbook: ExcelJS.stream.xlsx.WorkbookWriter, available: Available, studyMarginDb: number): LinkCells {
  const sheet = workbook.addWorksheet(linkSheetName)
  const cells: LinkCells = { cOverN0: new Map(), requiredMargin: new Map() }
  sheet.columns = [30, 16, 15, 13, 16, 12, 10, 18, 40].map(width => ({ width }))
  for (const index of [columns.value, columns.level]) sheet.getColumn(index).numFmt = '0.00'
  styleRow(sheet.addRow(['Link cases']), titleStyle).commit()
  if (available.from === 'link') {
    for (const item of available.cases) writeCase(sheet, item, available.lines, item.requiredMarginDb ?? studyMarginDb, cells)
  } else if (available.from === 'entered') {
    sheet.addRow(['Available Es/N0 as entered', null, null, null, null, available.esN0Db, 'dB']).commit()
  } else {
    sheet.addRow(['N0 in signal units squared', null, null, null, null, available.n0]).commit()
  }
  sheet.commit()
  return cells
}
