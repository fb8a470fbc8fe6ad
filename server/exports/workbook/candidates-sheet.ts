import type ExcelJS from 'exceljs'
import { columns } from '#shared/columns'
import type { CellValue, ColumnContext, NumberFormat } from '#shared/columns'
import type { Candidate } from '#shared/schemas/candidates'
import type { StudyExport } from '../study-export'
import { verdictText } from '../verdict-text'
import { columnLetters } from './addresses'
import type { LinkCells } from './link-sheet'
import { spreadsheetFormats } from './number-formats'
import { rowFormulas } from './row-formulas'
import type { Letters } from './row-formulas'
import { failTint, fill, headerStyle, passTint, styleRow, unitStyle } from './styles'

interface SheetColumn {
  id: string
  title: string
  unit: string
  format: NumberFormat
  width: number
  value: (row: Candidate, context: ColumnContext) => CellValue
}

const rowNumber = (): SheetColumn => {
  let count = 0
  return { id: 'rowNumber', title: 'Row', unit: '—', format: 'integer', width: 6, value: () => ++count }
}

/** The loss that the margin was computed with: the row's own or the study's. */
const lossUsed: SheetColumn = {
  id: 'lossUsed', title: 'Implementation loss used', unit: 'dB', format: '0.00', width: 14,
  value: row => row.values?.implementationLossDb ?? null,
}

const sheetColumns = (): SheetColumn[] => [
  rowNumber(),
  ...columns.map(c => ({
    id: c.id, title: c.title, unit: c.unit ?? '—', format: c.format, width: Math.min(40, Math.max(11, c.width)),
    value: c.id === 'verdict' ? verdictText : c.value,
  })),
  lossUsed,
]

const formulaColumns = ['requiredEsN0', 'netBits', 'availableEsN0', 'backOffValue', 'symbolRate', 'lossUsed', 'margin', 'requiredMargin'] as const

function lettersOf(shown: SheetColumn[]): Letters {
  const letter = (id: string) => {
    const index = shown.findIndex(c => c.id === id)
    if (index < 0) throw new Error(`The export's formulas need the column ${id}.`)
    return columnLetters(index + 1)
  }
  return Object.fromEntries(formulaColumns.map(id => [id, letter(id)])) as Letters
}

/** The grid as typed cells: titles, units, a row a candidate; margin, surplus, available and Eb/N0 stay live. */
export async function writeCandidatesSheet(workbook: ExcelJS.stream.xlsx.WorkbookWriter, data: StudyExport, link: LinkCells) {
  const shown = sheetColumns()
  const letters = lettersOf(shown)
  const last = columnLetters(shown.length)
  const sheet = workbook.addWorksheet('Candidates', { views: [{ state: 'frozen', xSplit: 2, ySplit: 2 }] })
  sheet.columns = shown.map(c => ({ width: c.width, style: { numFmt: spreadsheetFormats[c.format] } }))
  sheet.autoFilter = `A2:${last}2`
  styleRow(sheet.addRow(shown.map(c => c.title)), headerStyle).commit()
  styleRow(sheet.addRow(shown.map(c => c.unit)), unitStyle).commit()

  const context: ColumnContext = { reference: data.reference, requirements: data.study.requirements }
  const verdictColumn = shown.findIndex(c => c.id === 'verdict') + 1
  for await (const page of data.rows()) {
    for (const candidate of page) {
      const row = sheet.addRow([])
      const formulas = candidate.values ? rowFormulas(candidate.values, row.number, letters, data.study.requirements, link) : {}
      shown.forEach((column, i) => {
        const value = column.value(candidate, context)
        const formula = formulas[column.id]
        if (formula !== undefined && typeof value === 'number') row.getCell(i + 1).value = { formula, result: value }
        else if (value !== null) row.getCell(i + 1).value = value
      })
      if (candidate.values) row.getCell(verdictColumn).fill = fill(candidate.values.passes ? passTint : failTint)
      row.commit()
    }
  }
  sheet.commit()
}
