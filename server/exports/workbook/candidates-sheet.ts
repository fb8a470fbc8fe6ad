import type ExcelJS from 'exceljs'
import type { ColumnContext } from '#shared/columns'
import type { StudyExport } from '../study-export'
import { columnLetters } from './addresses'
import type { CandidatesLayout } from './candidates-layout'
import { candidatesSheetName, firstRow } from './candidates-layout'
import { spreadsheetFormats } from './number-formats'
import { rowFormulas } from './row-formulas'
import type { StudyCells } from './row-formulas'
import { headerStyle, styleRow, unitStyle } from './styles'
import { tintVerdicts } from './verdict-tints'

/** The grid as typed cells: titles, units, a row a candidate; rates, available, margin, surplus, Eb/N0 and the verdict stay live. */
export async function writeCandidatesSheet(
  workbook: ExcelJS.stream.xlsx.WorkbookWriter, data: StudyExport, layout: CandidatesLayout, cells: StudyCells,
) {
  const sheet = workbook.addWorksheet(candidatesSheetName, { views: [{ state: 'frozen', xSplit: 2, ySplit: firstRow - 1 }] })
  sheet.columns = layout.columns.map(c => ({ width: c.width, style: { numFmt: spreadsheetFormats[c.format] } }))
  styleRow(sheet.addRow(layout.columns.map(c => c.title)), headerStyle).commit()
  styleRow(sheet.addRow(layout.columns.map(c => c.unit)), unitStyle).commit()

  const context: ColumnContext = { reference: data.reference, requirements: data.study.requirements }
  let last = firstRow - 1
  for await (const page of data.rows()) {
    for (const candidate of page) {
      const row = sheet.addRow([])
      last = row.number
      const formulas = rowFormulas(candidate, last, layout, cells)
      layout.columns.forEach((column, i) => {
        const value = column.value(candidate, context)
        if (value === null) return
        const formula = formulas[column.id]
        row.getCell(i + 1).value = formula ? { formula, result: value } : value
      })
      row.commit()
    }
  }
  // The drop-downs stand in the row of units, the last of the header: a filter or a sort leaves both header rows in their place.
  sheet.autoFilter = `A${firstRow - 1}:${columnLetters(layout.columns.length)}${last}`
  if (last >= firstRow) tintVerdicts(sheet, layout.letters('verdict'), firstRow, last)
  sheet.commit()
}
