import type ExcelJS from 'exceljs'
import { lowOf, valueOf } from '#shared/modulation/estimate'
import { floorToDigits } from '#shared/modulation/rounding'
import type { MustHaveKind } from '#shared/schemas/requirements'
import { heldConstantKinds, mustHaveKinds, targetQuantities } from '#shared/schemas/requirements'
import type { StudyExport } from '../study-export'
import { fixedAddress, wholeColumn } from './addresses'
import type { CandidatesLayout } from './candidates-layout'
import { candidatesSheetName } from './candidates-layout'
import { spreadsheetFormats } from './number-formats'
import { headerStyle, headingStyle, proseStyle, styleRow, titleStyle } from './styles'
import { limitWords, summarySheetName } from './summary-cells'
import type { SummaryCells } from './summary-cells'
import { tintVerdicts } from './verdict-tints'

/** When, to the minute, in words that no locale misreads. */
export const stamp = (at: Date) => `${at.toISOString().slice(0, 16).replace('T', ' ')} UTC`

const liveness = 'Change an input where it stands, on this sheet or among the link cases: rates, available Es/N0, margins, surplus and verdicts follow. '
  + 'Required Es/N0, back-off, geometry, error rates and curves are the numbers computed for this export and do not.'

function writeFacts(sheet: ExcelJS.Worksheet, data: StudyExport) {
  const { study, counts } = data
  const people = data.members.map(m => `${m.name} (${m.role})`).join(', ')
  for (const [label, value] of [
    ['Study', study.name], ['Description', study.description], ['State', study.archivedAt ? 'archived' : 'draft'],
    ['People', people], ['Exported by', data.by], ['Exported at', stamp(data.at)],
    ['Last changed', stamp(new Date(study.updatedAt))],
    ['Software', `Halfplane ${data.version}, numerical core ${data.coreVersion}`],
    ['Candidates when exported', `${counts.candidates} in all: ${counts.passing} pass, ${counts.failed} cannot be computed, ${counts.computing} being computed`],
    ['What follows a change', liveness],
  ] as const) {
    const row = sheet.addRow([label, value])
    row.getCell(1).font = { bold: true }
    row.getCell(2).style = proseStyle
    row.commit()
  }
}

function writeRequirements(sheet: ExcelJS.Worksheet, { study: { requirements: r } }: StudyExport): SummaryCells {
  const held = heldConstantKinds[r.heldConstant.kind]
  /** Adds a row and answers where its value stands. */
  const input = (title: string, value: number | string, unit?: string, numFmt?: string) => {
    const row = sheet.addRow([title, value, unit])
    if (numFmt) row.getCell(2).numFmt = numFmt
    row.commit()
    return fixedAddress(summarySheetName, 2, row.number)
  }
  styleRow(sheet.addRow(['Requirements']), headingStyle).commit()
  styleRow(sheet.addRow(['What', 'Value', 'Unit', 'ID', 'Reason']), headerStyle).commit()
  const mustHaves = new Map<MustHaveKind, { value: string, id: string }>()
  for (const m of r.mustHaves) {
    const { title, unit } = mustHaveKinds[m.kind]
    const row = sheet.addRow([title, m.value, unit, m.id, m.reason])
    mustHaves.set(m.kind, { value: fixedAddress(summarySheetName, 2, row.number), id: fixedAddress(summarySheetName, 4, row.number) })
    row.commit()
  }
  input(`Target ${targetQuantities[r.target.quantity].words}`, r.target.value, undefined, '0.0E+0')
  input('Target holds', r.target.stage === 'beforeDecoding' ? 'before decoding' : 'after decoding')
  return {
    mustHaves,
    held: input(`Held constant: ${held.title.toLowerCase()}`, r.heldConstant.value, held.unit),
    limitedBy: input('Limited by', limitWords[r.limitedBy]),
    overhead: input('Overhead', r.overhead, undefined, '0.0%'),
    rollOff: input('Roll-off', r.rollOff),
    implementationLoss: input('Implementation loss', r.implementationLossDb, 'dB'),
    dimensionsPerInterval: input('Real dimensions in one symbol interval', r.dimensionsPerInterval),
  }
}

/** Leading rows are found by their identifier, so that they stay what they are when the candidates' sheet is sorted. */
function writeLeading(sheet: ExcelJS.Worksheet, { leading }: StudyExport, { letters }: CandidatesLayout) {
  styleRow(sheet.addRow(['Leading candidates when exported']), headingStyle).commit()
  const header = styleRow(sheet.addRow(['Candidate', 'Surplus, dB', 'Required Es/N0, dB', 'Net rate, Mbit/s', 'Verdict', 'Identifier']), headerStyle)
  const first = header.number + 1
  header.commit()
  const column = (id: string) => wholeColumn(candidatesSheetName, letters(id))
  let last = header.number
  for (const { id, inputs, values } of leading) {
    if (!values) continue
    const row = sheet.addRow([inputs.name])
    last = row.number
    const live = (of: string, result: number | string | null): ExcelJS.CellValue =>
      result === null ? null : { formula: `INDEX(${column(of)},MATCH($F${last},${column('identifier')},0))`, result }
    row.getCell(2).value = live('surplus', values.surplusDb === null ? null : floorToDigits(lowOf(values.surplusDb), 2))
    row.getCell(3).value = live('requiredEsN0', values.requiredEsN0Db === null ? null : valueOf(values.requiredEsN0Db))
    row.getCell(4).value = live('netRate', values.netBitRate / 1e6)
    row.getCell(5).value = live('verdict', values.verdict)
    row.getCell(6).value = id
    row.getCell(2).numFmt = spreadsheetFormats['+0.00']
    row.getCell(3).numFmt = spreadsheetFormats['0.00']
    row.getCell(4).numFmt = spreadsheetFormats['0.0']
    row.commit()
  }
  if (last >= first) tintVerdicts(sheet, 'E', first, last)
}

/**
 * First sheet: the study, its requirements, who and when, and the candidates that lead.
 * @returns where the study's inputs stand
 */
export function writeSummarySheet(workbook: ExcelJS.stream.xlsx.WorkbookWriter, data: StudyExport, layout: CandidatesLayout): SummaryCells {
  const sheet = workbook.addWorksheet(summarySheetName)
  sheet.columns = [38, 44, 18, 16, 70, 24].map(width => ({ width }))
  styleRow(sheet.addRow([data.study.name]), titleStyle).commit()
  writeFacts(sheet, data)
  sheet.addRow([]).commit()
  const cells = writeRequirements(sheet, data)
  sheet.addRow([]).commit()
  writeLeading(sheet, data, layout)
  sheet.commit()
  return cells
}
