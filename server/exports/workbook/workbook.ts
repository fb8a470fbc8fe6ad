import type { Writable } from 'node:stream'
import ExcelJS from 'exceljs'
import type { StudyExport } from '../study-export'
import { candidatesLayout } from './candidates-layout'
import { writeCandidatesSheet } from './candidates-sheet'
import { writeCurvesSheet } from './curves-sheet'
import { writeLinkSheet } from './link-sheet'
import { writeCautionsSheet, writeMethodsSheet } from './methods-sheet'
import { writePointsSheet } from './points-sheet'
import { writeSummarySheet } from './summary-sheet'

/**
 * The trade study as an XLSX workbook, written row by row, so that memory does not grow with the grid.
 * @param stream ends when the workbook is complete
 */
export async function writeWorkbook(data: StudyExport, stream: Writable): Promise<void> {
  const workbook = new ExcelJS.stream.xlsx.WorkbookWriter({ stream, useStyles: true, useSharedStrings: false })
  workbook.creator = data.by
  workbook.title = data.study.name
  workbook.created = data.at
  // Spreadsheets recompute the formulas on opening, so that an edited cell and its neighbours agree.
  workbook.calcProperties = { fullCalcOnLoad: true }
  const { requirements } = data.study
  const layout = candidatesLayout(requirements)
  const summary = writeSummarySheet(workbook, data, layout)
  const link = writeLinkSheet(workbook, requirements, summary)
  await writeCandidatesSheet(workbook, data, layout, { requirements, summary, link })
  writeCurvesSheet(workbook, data)
  await writePointsSheet(workbook, data)
  writeMethodsSheet(workbook)
  writeCautionsSheet(workbook)
  await workbook.commit()
}
