import { setImmediate } from 'node:timers/promises'
import type ExcelJS from 'exceljs'
import type { StudyExport } from '../study-export'
import { headerStyle, styleRow, unitStyle } from './styles'

/** Most rows of a sheet, after its header and with room for the sentence that ends it. */
const mostPoints = 1_048_576 - 3

/** Coordinates of points of more than two dimensions. */
const further = [3, 4, 5, 6, 7, 8].map(n => `Coordinate ${n}`)

/** Points of the pinned rows and of those with a role, in signal units after each row's normalisation. */
export async function writePointsSheet(workbook: ExcelJS.stream.xlsx.WorkbookWriter, { constellations }: StudyExport): Promise<void> {
  const sheet = workbook.addWorksheet('Constellations', { views: [{ state: 'frozen', xSplit: 1, ySplit: 2 }] })
  sheet.columns = [28, 10, 16, 16, ...further.map(() => 16)].map(width => ({ width }))
  for (const index of [3, 4, ...further.map((_, i) => 5 + i)]) sheet.getColumn(index).numFmt = '0.000000'
  styleRow(sheet.addRow(['Candidate', 'Point', 'I', 'Q', ...further]), headerStyle).commit()
  styleRow(sheet.addRow(['—', 'counted from 0', 'signal units', 'signal units', ...further.map(() => 'signal units')]), unitStyle).commit()
  let written = 0
  for (const { row, points } of constellations()) {
    if (written + points.length > mostPoints) {
      sheet.addRow(['A sheet holds no more points: pin fewer rows, or give fewer of them a role.']).commit()
      break
    }
    points.forEach((point, i) => sheet.addRow([row.inputs.name, i, ...point]).commit())
    written += points.length
    // Other requests go in between.
    await setImmediate()
  }
  sheet.autoFilter = `A2:J${2 + written}`
  if (written === 0) sheet.addRow(['Pin a row or give it a role to have its points here.']).commit()
  sheet.commit()
}
