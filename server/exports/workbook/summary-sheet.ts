import type ExcelJS from 'exceljs'
import { heldConstantKinds, mustHaveKinds } from '#shared/schemas/requirements'
import type { StudyExport } from '../study-export'
import { headerStyle, headingStyle, proseStyle, styleRow, titleStyle, fill, failTint, passTint } from './styles'

const limits = { meanPower: 'mean power', peakPower: 'peak power' }

/** When, to the minute, in words that no locale misreads. */
export const stamp = (at: Date) => `${at.toISOString().slice(0, 16).replace('T', ' ')} UTC`

function writeFacts(sheet: ExcelJS.Worksheet, data: StudyExport) {
  const { study, counts } = data
  const people = data.members.map(m => `${m.name} (${m.role})`).join(', ')
  for (const [label, value] of [
    ['Study', study.name], ['Description', study.description], ['State', study.archivedAt ? 'archived' : 'draft'],
    ['People', people], ['Exported by', data.by], ['Exported at', stamp(data.at)],
    ['Last changed', stamp(new Date(study.updatedAt))],
    ['Software', `Halfplane ${data.version}, numerical core ${data.coreVersion}`],
    ['Candidates', `${counts.candidates} in all: ${counts.passing} pass, ${counts.failed} could not be computed, ${counts.computing} being computed`],
  ] as const) {
    const row = sheet.addRow([label, value])
    row.getCell(1).font = { bold: true }
    row.getCell(2).style = proseStyle
    row.commit()
  }
}

function writeRequirements(sheet: ExcelJS.Worksheet, { study: { requirements: r } }: StudyExport) {
  const held = heldConstantKinds[r.heldConstant.kind]
  styleRow(sheet.addRow(['Requirements']), headingStyle).commit()
  styleRow(sheet.addRow(['What', 'Value', 'Unit', 'ID', 'Reason']), headerStyle).commit()
  for (const m of r.mustHaves) {
    const { title, unit } = mustHaveKinds[m.kind]
    sheet.addRow([title, m.value, unit, m.id, m.reason]).commit()
  }
  const target = sheet.addRow(['Target symbol error rate', r.target.value])
  target.getCell(2).numFmt = '0.0E+0'
  target.commit()
  sheet.addRow([`Held constant: ${held.title.toLowerCase()}`, r.heldConstant.value, held.unit]).commit()
  sheet.addRow(['Limited by', limits[r.limitedBy]]).commit()
  const overhead = sheet.addRow(['Overhead', r.overhead])
  overhead.getCell(2).numFmt = '0.0%'
  overhead.commit()
  sheet.addRow(['Roll-off', r.rollOff]).commit()
  sheet.addRow(['Implementation loss', r.implementationLossDb, 'dB']).commit()
  sheet.addRow(['Real dimensions in one symbol interval', r.dimensionsPerInterval]).commit()
}

function writeLeading(sheet: ExcelJS.Worksheet, { leading }: StudyExport) {
  styleRow(sheet.addRow(['Leading candidates']), headingStyle).commit()
  styleRow(sheet.addRow(['Candidate', 'Surplus, dB', 'Required Es/N0, dB', 'Net rate, Mbit/s', 'Verdict']), headerStyle).commit()
  for (const { inputs, values } of leading) {
    if (!values) continue
    const row = sheet.addRow([inputs.name, values.surplusDb, values.requiredEsN0Db, values.netBitRate / 1e6, values.verdict])
    row.getCell(2).numFmt = '+0.00;−0.00;0.00'
    row.getCell(3).numFmt = '0.00'
    row.getCell(4).numFmt = '0.0'
    row.getCell(5).fill = fill(values.passes ? passTint : failTint)
    row.commit()
  }
}

/** First sheet: the study, its requirements, who and when, and the candidates that lead. */
export function writeSummarySheet(workbook: ExcelJS.stream.xlsx.WorkbookWriter, data: StudyExport) {
  const sheet = workbook.addWorksheet('Summary')
  sheet.columns = [38, 44, 18, 16, 70].map(width => ({ width }))
  styleRow(sheet.addRow([data.study.name]), titleStyle).commit()
  writeFacts(sheet, data)
  sheet.addRow([]).commit()
  writeRequirements(sheet, data)
  sheet.addRow([]).commit()
  writeLeading(sheet, data)
  sheet.commit()
}
