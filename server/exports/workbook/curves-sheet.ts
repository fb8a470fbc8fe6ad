import type ExcelJS from 'exceljs'
import type { StudyExport } from '../study-export'
import { headerStyle, styleRow, unitStyle } from './styles'

/** Curves of the pinned rows, one below the other, so that a filter on the first column picks a row. */
export function writeCurvesSheet(workbook: ExcelJS.stream.xlsx.WorkbookWriter, { pinned }: StudyExport) {
  const sheet = workbook.addWorksheet('Curves', { views: [{ state: 'frozen', xSplit: 1, ySplit: 2 }] })
  sheet.columns = [28, 14, 18, 24, 18].map(width => ({ width }))
  for (const index of [3, 4, 5]) sheet.getColumn(index).numFmt = '0.00E+0'
  sheet.getColumn(2).numFmt = '0.00'
  styleRow(sheet.addRow(['Candidate', 'Es/N0', 'SER, union bound', 'SER, nearest-neighbour approximation', 'SER, exact']), headerStyle).commit()
  styleRow(sheet.addRow(['—', 'dB', '—', '—', '—']), unitStyle).commit()
  let last = 2
  for (const { row, curves } of pinned) {
    curves.esN0Db.forEach((esN0, i) => {
      const line = sheet.addRow([row.inputs.name, esN0, curves.serUnion[i], curves.serNearest[i], curves.serExact[i]])
      last = line.number
      line.commit()
    })
  }
  sheet.autoFilter = `A2:E${last}`
  if (!pinned.length) sheet.addRow(['No row is pinned: pin rows in the grid to have their curves here.']).commit()
  sheet.commit()
}
