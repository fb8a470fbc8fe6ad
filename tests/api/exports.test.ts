import ExcelJS from 'exceljs'
import Papa from 'papaparse'
import { beforeAll, describe, expect, it, vi } from 'vitest'
import { columns, headerOf } from '#shared/columns'
import type { Candidate } from '#shared/schemas/candidates'
import type { StudySummary } from '#shared/schemas/studies'
import type { CandidateConstellation, CandidateCurves } from '#shared/schemas/values'
import { signIn } from '../support/client'
import type { Client } from '../support/client'
import { computeFormula } from './formula'
import { allRows, change, ownStudy } from './own-study'

let owner: Client
/** the demonstration study: a link budget of two cases, peak-limited */
let ridge: string
let rows: Candidate[]
let book: ExcelJS.Workbook

const workbookOf = async (study: string) => {
  const { body } = await owner.get<Uint8Array>(`/api/studies/${study}/export.xlsx`)
  const workbook = new ExcelJS.Workbook()
  await workbook.xlsx.load(body.buffer as ArrayBuffer)
  return workbook
}
const csvOf = async (study: string) => {
  const { body } = await owner.get<string>(`/api/studies/${study}/export.csv`)
  const { data, errors } = Papa.parse<string[]>(body.trimEnd())
  expect(errors).toEqual([])
  return { head: data[0]!, lines: data.slice(1), text: body }
}
/** Waits until no row is being computed, and answers all of them. */
const computed = (study: string) => vi.waitFor(async () => {
  const found = await allRows(owner, study)
  if (found.some(({ state }) => state === 'computing')) throw new Error('Rows are still being computed.')
  return found
}, { timeout: 60_000, interval: 50 })
const letters = (column: number): string => column > 26 ? letters(Math.floor((column - 1) / 26)) + letters((column - 1) % 26 + 1) : String.fromCharCode(64 + column)
const titlesOf = (sheet: ExcelJS.Worksheet, row = 1) => (sheet.getRow(row).values as ExcelJS.CellValue[]).slice(1)

/** Value of a cell, formulas computed anew from what stands in the others; `overrides` replace entered cells. */
function valueOf(workbook: ExcelJS.Workbook, sheet: string, address: string, overrides: Record<string, number> = {}): number {
  const replaced = overrides[`${sheet}!${address}`]
  if (replaced !== undefined) return replaced
  const { value } = workbook.getWorksheet(sheet)!.getCell(address)
  if (typeof value === 'number') return value
  if (typeof value === 'object' && value !== null && 'formula' in value && value.formula) {
    return computeFormula(value.formula, (other, column, row) => valueOf(workbook, other ?? sheet, `${column}${row}`, overrides))
  }
  throw new Error(`${sheet}!${address} holds no number: ${JSON.stringify(value)}`)
}

beforeAll(async () => {
  owner = await signIn('owner')
  const { body } = await owner.get<{ items: StudySummary[] }>('/api/studies')
  ridge = body.items.find(({ name }) => name === 'Ridge station to valley gateway')!.id
  rows = await computed(ridge)
  book = await workbookOf(ridge)
})

describe('the workbook', () => {
  const candidates = () => book.getWorksheet('Candidates')!
  const column = (title: string) => titlesOf(candidates()).indexOf(title) + 1
  const lineOf = (row: Candidate) => rows.indexOf(row) + 3
  const cell = (row: Candidate, title: string) => candidates().getRow(lineOf(row)).getCell(column(title))

  it('has a sheet for each part of the study', () => {
    expect(book.worksheets.map(({ name }) => name)).toEqual(['Summary', 'Link cases', 'Candidates', 'Curves', 'Constellations', 'Methods', 'Cautions'])
  })

  it('lists every candidate by name, in the study\'s order', () => {
    expect(rows.map(row => cell(row, 'Name').value)).toEqual(rows.map(({ inputs }) => inputs.name))
    expect(candidates().rowCount).toBe(rows.length + 2)
  })

  it('has a row of units under the titles, both frozen, and a filter', () => {
    expect(titlesOf(candidates(), 2)[column('Required Es/N0') - 1]).toBe('dB')
    expect(titlesOf(candidates(), 2)[column('Net rate') - 1]).toBe('Mbit/s')
    expect(candidates().views[0]).toMatchObject({ state: 'frozen', xSplit: 2, ySplit: 2 })
    expect(candidates().autoFilter).toBe(`A2:${letters(candidates().columnCount)}2`)
  })

  it('holds numbers as numbers, in full, with a format', () => {
    for (const row of rows) {
      expect(cell(row, 'Required Es/N0').value).toBe(row.values!.requiredEsN0Db)
      expect(cell(row, 'Net rate').value).toBe(row.values!.netBitRate / 1e6)
    }
    expect(cell(rows[0]!, 'Required Es/N0').numFmt).toBe('0.00')
    expect(cell(rows[0]!, 'Surplus').numFmt).toBe('+0.00;-0.00;0.00')
  })

  it.each(['Margin', 'Surplus', 'Required Eb/N0', 'Available Es/N0', 'Required margin'])('%s is a formula that comes to what was computed', (title) => {
    for (const row of rows) {
      const address = `${letters(column(title))}${lineOf(row)}`
      const { value } = candidates().getCell(address)
      expect(value).toHaveProperty('formula')
      expect(valueOf(book, 'Candidates', address)).toBeCloseTo((value as { result: number }).result, 9)
    }
  })

  it('one decibel more of output power is one decibel more of surplus, by its own formulas', () => {
    const link = book.getWorksheet('Link cases')!
    const outputs: Record<string, number> = {}
    link.eachRow((row, number) => {
      if (row.getCell(1).value === 'Saturated output') outputs[`Link cases!F${number}`] = (row.getCell(6).value as number) + 1
    })
    expect(Object.keys(outputs)).toHaveLength(2)
    const address = `${letters(column('Surplus'))}3`
    expect(valueOf(book, 'Candidates', address, outputs)).toBeCloseTo(rows[0]!.values!.surplusDb! + 1, 9)
  })

  it('shades and words every verdict by its side', () => {
    for (const row of rows) {
      const { value, fill } = cell(row, 'Verdict')
      expect(value).toBe(row.values!.verdict)
      expect(fill).toMatchObject({ pattern: 'solid', fgColor: { argb: row.values!.passes ? 'FFD5E8E4' : 'FFF8DAD3' } })
    }
  })

  it('sums up the link cases by formulas over their lines', () => {
    const link = book.getWorksheet('Link cases')!
    const sums: number[] = []
    link.eachRow((row, number) => {
      if (row.getCell(1).value === 'C/N0') sums.push(valueOf(book, 'Link cases', `F${number}`))
    })
    // clear and faded, from the demonstration's lines: −55.54 and −72.74 dBm over −168.98 dBm/Hz
    expect(sums.map(sum => sum.toFixed(2))).toEqual(['113.43', '96.23'])
  })

  it('has the curves of the pinned rows as the server computed them', async () => {
    const pinned = rows.filter(({ pin }) => pin !== null)
    const lines = book.getWorksheet('Curves')!.getSheetValues().slice(3).map(line => (line as ExcelJS.CellValue[]).slice(1))
    expect(new Set(lines.map(([name]) => name))).toEqual(new Set(pinned.map(({ inputs }) => inputs.name)))
    const { body } = await owner.get<CandidateCurves>(`/api/candidates/${pinned[0]!.id}/curves`)
    const own = lines.filter(([name]) => name === pinned[0]!.inputs.name)
    expect(own.map(line => line[1])).toEqual(body.esN0Db)
    expect(own.map(line => line[4])).toEqual(body.serExact)
  })

  it('has the points of the pinned rows', async () => {
    const row = rows.find(({ pin, inputs }) => pin !== null && inputs.normalisation === 'meanEnergy')!
    const { body } = await owner.get<CandidateConstellation>(`/api/candidates/${row.id}/constellation`)
    const lines = book.getWorksheet('Constellations')!.getSheetValues().slice(3).map(line => (line as ExcelJS.CellValue[]).slice(1))
    const own = lines.filter(([name]) => name === row.inputs.name).map(([, , i, q]) => [i as number, q as number])
    expect(own).toHaveLength(body.points.length)
    own.forEach(([i, q], n) => {
      expect(i).toBeCloseTo(body.points[n]![0]!, 12)
      expect(q).toBeCloseTo(body.points[n]![1]!, 12)
    })
  })

  it('says who exported what, and what stands in the cautions', () => {
    const facts = book.getWorksheet('Summary')!.getSheetValues().slice(1).map(line => (line as ExcelJS.CellValue[] | undefined)?.slice(1) ?? [])
    expect(facts[0]?.[0]).toBe('Ridge station to valley gateway')
    expect(facts.find(([label]) => label === 'Exported by')?.[1]).toBe('Tomás Echeverri')
    expect(book.getWorksheet('Cautions')!.rowCount).toBeGreaterThan(3)
  })

  it('is offered as a file with the study\'s name and the day', async () => {
    const { headers } = await owner.get(`/api/studies/${ridge}/export.xlsx`)
    expect(headers.get('content-disposition')).toMatch(/^attachment; filename="Ridge-station-to-valley-gateway-\d{4}-\d\d-\d\d\.xlsx"/)
  })
})

describe('a row that could not be computed', () => {
  it('says why in the workbook and in the CSV, and has no number', async () => {
    const study = await ownStudy(owner, 'Failed rows')
    const { body } = await owner.post<Candidate>(`/api/studies/${study}/candidates`, { name: 'twelve', family: 'psk', order: 12 })
    const [row] = await computed(study)
    expect(body.id).toBe(row!.id)
    await change(owner, row!, { family: 'qam' })
    await expect.poll(async () => (await allRows(owner, study))[0]!.state).toBe('failed')
    const sentence = 'could not be computed: QAM has a power of two of points from 4 to 4096.'
    const sheet = (await workbookOf(study)).getWorksheet('Candidates')!
    const titles = titlesOf(sheet)
    expect(sheet.getRow(3).getCell(titles.indexOf('Verdict') + 1).value).toBe(sentence)
    expect(sheet.getRow(3).getCell(titles.indexOf('Required Es/N0') + 1).value).toBeNull()
    const { head, lines } = await csvOf(study)
    expect(lines[0]![head.indexOf('Verdict')]).toBe(sentence)
    expect(lines[0]![head.indexOf('Required Es/N0, dB')]).toBe('')
  })
})

describe('CSV and JSON', () => {
  it('the CSV has every column of every row, numbers in full', async () => {
    const { head, lines } = await csvOf(ridge)
    expect(head).toEqual(columns.map(headerOf))
    const { body: study } = await owner.get<{ requirements: never }>(`/api/studies/${ridge}`)
    const context = { reference: rows.find(({ inputs }) => inputs.role === 'reference') ?? null, requirements: study.requirements }
    expect(lines).toEqual(rows.map(row => columns.map((column) => {
      const value = column.value(row, context)
      return value === null ? '' : String(value)
    })))
  })

  it('the JSON has every row as the API gives it', async () => {
    const { body } = await owner.get<{ candidates: Candidate[] }>(`/api/studies/${ridge}/export.json`)
    expect(body.candidates).toEqual(rows.map(({ id, version, pin, inputs, state, errors, values }) => ({ id, version, pin, inputs, state, errors, values })))
  })

  it.each(['=1+1', '@x', '+x', '-x'])('a name like %s is text to a spreadsheet that opens the CSV', async (name) => {
    const study = await ownStudy(owner, 'Names like formulas')
    await owner.post(`/api/studies/${study}/candidates`, { name, note: '=HYPERLINK("http://example.org")' })
    await computed(study)
    const { head, lines } = await csvOf(study)
    expect(lines[0]![head.indexOf('Name')]).toBe(`'${name}`)
    expect(lines[0]![head.indexOf('Note')]).toBe('\'=HYPERLINK("http://example.org")')
  })

  it('a name like a formula is a plain text in the workbook', async () => {
    const study = await ownStudy(owner, 'A name like a formula')
    await owner.post(`/api/studies/${study}/candidates`, { name: '=1+1' })
    await computed(study)
    const sheet = (await workbookOf(study)).getWorksheet('Candidates')!
    expect(sheet.getRow(3).getCell(titlesOf(sheet).indexOf('Name') + 1).value).toBe('=1+1')
  })
})

describe('many rows', () => {
  it('2,000 rows come out whole, in each format', async () => {
    const study = await ownStudy(owner, 'Two thousand')
    const items = Array.from({ length: 2000 }, (_, i) => ({ name: `row ${i}`, note: `note of ${i}` }))
    await owner.post(`/api/studies/${study}/candidates`, { items })
    await computed(study)
    const names = items.map(({ name }) => name)
    const sheet = (await workbookOf(study)).getWorksheet('Candidates')!
    const at = titlesOf(sheet).indexOf('Name') + 1
    expect(names.map((_, i) => sheet.getRow(i + 3).getCell(at).value)).toEqual(names)
    const { head, lines } = await csvOf(study)
    expect(lines.map(line => line[head.indexOf('Name')])).toEqual(names)
    const { body } = await owner.get<{ candidates: Candidate[] }>(`/api/studies/${study}/export.json`)
    expect(body.candidates.map(({ inputs }) => inputs.name)).toEqual(names)
  })
})

it('an observer may export, a stranger sees no study', async () => {
  expect((await (await signIn('observer')).get(`/api/studies/${ridge}/export.csv`)).status).toBe(200)
  const own = await ownStudy(owner, 'Not shared')
  expect((await (await signIn('observer')).get(`/api/studies/${own}/export.xlsx`)).status).toBe(404)
})
