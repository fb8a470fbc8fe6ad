import type ExcelJS from 'exceljs'

/** ARGB colours of the drafting sheet, in tints that print. */
const ink = 'FF1B2A49'
const rule = 'FFB9B4A6'
const wash = 'FFF1EEE4'
export const passTint = 'FFD5E8E4'
export const failTint = 'FFF8DAD3'

export const fill = (argb: string): ExcelJS.Fill => ({ type: 'pattern', pattern: 'solid', fgColor: { argb } })

export const titleStyle: Partial<ExcelJS.Style> = { font: { bold: true, size: 16, color: { argb: ink } } }
export const headingStyle: Partial<ExcelJS.Style> = { font: { bold: true, size: 12, color: { argb: ink } } }
export const headerStyle: Partial<ExcelJS.Style> = {
  font: { bold: true, color: { argb: ink } },
  fill: fill(wash),
  alignment: { vertical: 'top', wrapText: true },
  border: { bottom: { style: 'thin', color: { argb: rule } } },
}
export const unitStyle: Partial<ExcelJS.Style> = {
  font: { italic: true, color: { argb: ink } },
  fill: fill(wash),
  border: { bottom: { style: 'thin', color: { argb: ink } } },
}
export const proseStyle: Partial<ExcelJS.Style> = { alignment: { wrapText: true, vertical: 'top' } }

/** Applies a style to every cell of a row that holds something, and finishes the row. */
export function styleRow(row: ExcelJS.Row, style: Partial<ExcelJS.Style>) {
  row.eachCell((cell) => {
    cell.style = { ...cell.style, ...style }
  })
  return row
}
