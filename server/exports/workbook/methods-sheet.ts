import type ExcelJS from 'exceljs'
import { cautions } from '#shared/cautions'
import { columns } from '#shared/columns'
import { headerStyle, proseStyle, styleRow, titleStyle } from './styles'

/** What every column means: the definitions that name the grid's columns. */
export function writeMethodsSheet(workbook: ExcelJS.stream.xlsx.WorkbookWriter) {
  const sheet = workbook.addWorksheet('Methods', { views: [{ state: 'frozen', ySplit: 1 }] })
  sheet.columns = [30, 16, 60, 60, 36, 30].map(width => ({ width }))
  styleRow(sheet.addRow(['Column', 'Unit', 'Meaning', 'Formula', 'Source', 'Tolerance']), headerStyle).commit()
  for (const c of columns) {
    const computed = c.kind === 'computed' ? [c.formula, c.source, c.tolerance] : ['entered']
    styleRow(sheet.addRow([c.title, c.unit ?? '—', c.meaning, ...computed]), proseStyle).commit()
  }
  sheet.commit()
}

export function writeCautionsSheet(workbook: ExcelJS.stream.xlsx.WorkbookWriter) {
  const sheet = workbook.addWorksheet('Cautions')
  sheet.columns = [{ width: 110 }]
  styleRow(sheet.addRow(['Cautions']), titleStyle).commit()
  for (const caution of cautions) styleRow(sheet.addRow([caution]), proseStyle).commit()
  sheet.commit()
}
