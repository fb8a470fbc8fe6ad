import type ExcelJS from 'exceljs'
import type { LinkStep, PowerUnit } from '#shared/modulation'
import { boltzmann, referenceTemperature, speedOfLight } from '#shared/modulation'

export const lineColumns = { name: 1, kind: 2, frequency: 3, distance: 4, noiseFigure: 5, value: 6, unit: 7, level: 8, source: 9 }
const kinds = { power: 'power', gain: 'gain', loss: 'loss', freeSpaceLoss: 'free-space loss', noiseFigure: 'noise density' }
/** In formulas the exponent's letter is a capital. */
const boltzmannText = String(boltzmann).toUpperCase()
const lossConstant = `20*LOG10(4*PI()*1E12/${speedOfLight})`
const signs = { power: '', gain: '', loss: '-', freeSpaceLoss: '-' } as const

/** Level and noise density after some lines: the cells that hold them, and what they come to. */
export interface Running {
  level: { cell: string, value: number } | null
  noise: { cell: string, value: number } | null
}

/** Value of a line: typed lines are formulas over their own inputs, so that the sheet goes on computing. */
function valueCell({ line, valueDb }: LinkStep, row: number, unit: PowerUnit): ExcelJS.CellValue {
  switch (line.kind) {
    case 'freeSpaceLoss':
      return { formula: `${lossConstant}+20*LOG10(C${row})+20*LOG10(D${row})`, result: valueDb }
    case 'noiseFigure':
      return { formula: `10*LOG10(${boltzmannText}*${referenceTemperature}${unit === 'dBm' ? '*1000' : ''})+E${row}`, result: valueDb }
    default: return valueDb
  }
}

function writeLine(sheet: ExcelJS.Worksheet, step: LinkStep, unit: PowerUnit, { level, noise }: Running): Running {
  const { line, valueDb } = step
  const row = sheet.addRow([line.name, kinds[line.kind]])
  if (line.kind === 'freeSpaceLoss') {
    row.getCell(lineColumns.frequency).value = line.frequencyGhz
    row.getCell(lineColumns.distance).value = line.distanceKm
  }
  if (line.kind === 'noiseFigure') row.getCell(lineColumns.noiseFigure).value = line.noiseFigureDb
  row.getCell(lineColumns.value).value = valueCell(step, row.number, unit)
  row.getCell(lineColumns.unit).value = line.kind === 'noiseFigure' ? `${unit}/Hz` : line.kind === 'power' ? unit : 'dB'
  row.getCell(lineColumns.source).value = line.source
  if (line.kind === 'noiseFigure') return { level, noise: { cell: `F${row.number}`, value: valueDb } }
  const sign = signs[line.kind]
  const value = (level?.value ?? 0) + (sign === '-' ? -valueDb : valueDb)
  row.getCell(lineColumns.level).value = { formula: level ? `${level.cell}${sign || '+'}F${row.number}` : `${sign}F${row.number}`, result: value }
  return { level: { cell: `H${row.number}`, value }, noise }
}

/**
 * Lines of a link budget, a row each, with the level after each as a formula.
 * @param from what stands before the first of them
 */
export const writeLines = (sheet: ExcelJS.Worksheet, steps: readonly LinkStep[], unit: PowerUnit, from: Running): Running =>
  steps.reduce((running, step) => writeLine(sheet, step, unit, running), from)
