import ExcelJS from 'exceljs'
import Papa from 'papaparse'
import { beforeAll, describe, expect, it, vi } from 'vitest'
import { columns, headerOf } from '#shared/columns'
import { lowOf } from '#shared/modulation/estimate'
import type { Candidate } from '#shared/schemas/candidates'
import type { StudySummary } from '#shared/schemas/studies'
import type { CandidateConstellation, CandidateCurves } from '#shared/schemas/values'
import { signIn } from '../support/client'
import type { Client } from '../support/client'
import { computeFormula } from './formula'
import type { Scalar } from './formula'
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

type Entered = Record<string, number | string | null>

/** Value of a cell, formulas computed anew from what stands in the others; `entered` replaces cells, `known` keeps what was computed. */
function valueOf(workbook: ExcelJS.Workbook, sheet: string, address: string, entered: Entered = {}, known = new Map<string, Scalar>()): Scalar {
  const key = `${sheet}!${address}`
  if (key in entered) return entered[key]!
  const { value } = workbook.getWorksheet(sheet)!.getCell(address)
  if (value === null || typeof value === 'number' || typeof value === 'string') return value
  if (typeof value !== 'object' || !('formula' in value) || !value.formula) throw new Error(`${key} holds neither a value nor a formula.`)
  if (!known.has(key)) {
    known.set(key, computeFormula(value.formula, {
      cell: (other, column, row) => valueOf(workbook, other ?? sheet, `${column}${row}`, entered, known),
      lastRow: other => workbook.getWorksheet(other ?? sheet)!.rowCount,
    }))
  }
  return known.get(key)!
}

/** Every cell of a sheet that holds a formula. */
function formulasOf(sheet: ExcelJS.Worksheet): ExcelJS.Cell[] {
  const found: ExcelJS.Cell[] = []
  sheet.eachRow(row => row.eachCell((cell) => {
    if (cell.formula) found.push(cell)
  }))
  return found
}

/** Addresses in a column of a sheet whose row begins with a text. */
function cellsBeside(sheet: ExcelJS.Worksheet, label: string, column: string): string[] {
  const found: string[] = []
  sheet.eachRow((row, number) => {
    if (row.getCell(1).value === label) found.push(`${column}${number}`)
  })
  return found
}

/** What stands in a formula's cell until it is computed again; ExcelJS leaves a nought out when it reads one. */
const cached = (cell: ExcelJS.Cell) => (cell.value as { result?: number | string }).result ?? 0

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

  it('has a row of units under the titles, both frozen, and a filter over all rows', () => {
    expect(titlesOf(candidates(), 2)[column('Required Es/N0') - 1]).toBe('dB')
    expect(titlesOf(candidates(), 2)[column('Net rate') - 1]).toBe('Mbit/s')
    expect(candidates().views[0]).toMatchObject({ state: 'frozen', xSplit: 2, ySplit: 2 })
    expect(candidates().autoFilter).toBe(`A2:${letters(candidates().columnCount)}${rows.length + 2}`)
  })

  it('holds numbers as numbers, in full, with a format', () => {
    for (const row of rows) {
      expect(cell(row, 'Required Es/N0').value).toBe(row.values!.requiredEsN0Db)
      expect(cached(cell(row, 'Net rate'))).toBe(row.values!.netBitRate / 1e6)
    }
    expect(cell(rows[0]!, 'Required Es/N0').numFmt).toBe('0.00')
    expect(cell(rows[0]!, 'Surplus').numFmt).toBe('+0.00;-0.00;0.00')
  })

  const address = (row: Candidate, title: string) => `${letters(column(title))}${lineOf(row)}`
  const now = (row: Candidate, title: string, entered: Entered = {}) => valueOf(book, 'Candidates', address(row, title), entered)
  const named = (name: string) => rows.find(({ inputs }) => inputs.name === name)!
  const inputCell = (sheet: string, label: string, column: string) => `${sheet}!${cellsBeside(book.getWorksheet(sheet)!, label, column)[0]}`

  it.each(['Summary', 'Link cases', 'Candidates'])('every formula of the sheet %s comes to the number or the words that stand in its cell', (name) => {
    const found = formulasOf(book.getWorksheet(name)!)
    expect(found.length).toBeGreaterThan(10)
    const known = new Map<string, Scalar>()
    for (const cell of found) {
      const computed = valueOf(book, name, cell.address, {}, known)
      if (typeof computed === 'number') expect(computed, cell.address).toBeCloseTo(cached(cell) as number, 9)
      else expect(computed, cell.address).toBe(cached(cell))
    }
  })

  it.each([
    'Verdict', 'Margin', 'Surplus', 'Required Eb/N0', 'Available Es/N0', 'Required margin', 'Deciding case', 'Net rate', 'Symbol rate Rs', 'Implementation loss used',
  ])('%s is a formula in every row', (title) => {
    for (const row of rows) expect(cell(row, title).formula, row.inputs.name).toBeTruthy()
  })

  it('the exact margins are the page\'s, in full', () => {
    for (const row of rows) {
      expect(cached(cell(row, 'Surplus, exact'))).toBe(row.values!.surplusDb)
      expect(cached(cell(row, 'Available Es/N0, exact'))).toBe(row.values!.availableEsN0Db)
    }
  })

  it('no margin is shown better than it is: 16-QAM is 0.14 dB short, hexagonal 16 has 0.51 dB to spare', () => {
    for (const title of ['Margin', 'Surplus', 'Available Es/N0', 'Available Eb/N0']) {
      for (const row of rows) {
        const shown = Number((now(row, title) as number).toFixed(2))
        const exact = now(row, `${title}, exact`) as number
        expect(shown).toBeLessThanOrEqual(exact + 1e-9)
        expect(shown).toBeGreaterThan(exact - 0.01)
      }
    }
    expect(cached(cell(named('16-QAM'), 'Surplus'))).toBe(-0.14)
    expect(cached(cell(named('hexagonal 16'), 'Surplus'))).toBe(0.51)
  })

  it('common lines, required margin, implementation loss and symbol rate each stand in one cell', () => {
    const link = book.getWorksheet('Link cases')!
    expect(cellsBeside(link, 'Saturated output', 'F')).toHaveLength(1)
    const margin = book.getWorksheet('Summary')!.getCell(cellsBeside(book.getWorksheet('Summary')!, 'Required margin', 'B')[0]!)
    expect(margin.value).toBe(1)
    expect(cell(rows[0]!, 'Implementation loss used').formula).toContain('Summary!')
    expect(cell(rows[0]!, 'Symbol rate Rs').formula).toMatch(/^Summary!\$B\$\d+$/)
  })

  it('one decibel more of output power, in its one cell, is one decibel more of surplus', () => {
    const output = inputCell('Link cases', 'Saturated output', 'F')
    const entered = { [output]: 28 }
    expect(now(rows[0]!, 'Surplus, exact', entered)).toBeCloseTo(lowOf(rows[0]!.values!.surplusDb!) + 1, 9)
  })

  it('the verdict\'s words follow a link line', () => {
    const output = inputCell('Link cases', 'Saturated output', 'F')
    const row = rows.find(({ values }) => values!.passes)!
    expect(now(row, 'Verdict')).toBe('passes')
    expect(now(row, 'Verdict', { [output]: 17 })).toMatch(/^fails R\d+: margin \d+\.\d\d dB short at −\d+\.\d\d dB \(Faded\)$/)
    expect(now(named('16-QAM'), 'Verdict', { [output]: 28 })).toBe('passes')
  })

  it('the verdict follows the study\'s limits on the summary', () => {
    const row = rows.find(({ values }) => values!.passes)!
    expect(now(row, 'Verdict', { [inputCell('Summary', 'Minimum net bit rate', 'B')]: 1000 })).toMatch(/^fails R\d+: net bit rate \d+\.\d Mbit\/s short at \d+\.\d Mbit\/s$/)
    expect(now(row, 'Verdict', { [inputCell('Summary', 'Minimum net bit rate', 'B')]: row.values!.netBitRate / 1e6 + 0.004 }))
      .toMatch(/net bit rate 0\.004 Mbit\/s short/)
  })

  it('another case decides where it becomes the worst', () => {
    const margins = cellsBeside(book.getWorksheet('Link cases')!, 'Required margin', 'F')
    expect(margins).toHaveLength(2)
    const entered = { [`Link cases!${margins[0]}`]: 40 }
    expect(now(rows[0]!, 'Deciding case')).toBe('Faded')
    expect(now(rows[0]!, 'Deciding case', entered)).toBe('Clear')
    const { cases } = rows[0]!.values!
    expect(now(rows[0]!, 'Margin, exact', entered)).toBeCloseTo(lowOf(cases.find(({ name }) => name === 'Clear')!.marginDb!), 9)
  })

  it('a row\'s own implementation loss counts instead of the study\'s', () => {
    const own = { [`Candidates!${address(rows[0]!, 'Implementation loss')}`]: 3.5 }
    expect(now(rows[0]!, 'Surplus, exact', own)).toBeCloseTo(lowOf(rows[0]!.values!.surplusDb!) + rows[0]!.values!.implementationLossDb - 3.5, 9)
  })

  it('shades verdicts by their words: teal where they pass, vermilion where they fail or cannot be computed', () => {
    const [shading] = (candidates() as unknown as { conditionalFormattings: ExcelJS.ConditionalFormattingOptions[] }).conditionalFormattings
    expect(shading!.ref).toBe(`C3:C${rows.length + 2}`)
    expect(shading!.rules.map(({ style, ...rule }) => [(rule as { formulae: string[] }).formulae[0], (style!.fill as ExcelJS.FillPattern).bgColor!.argb])).toEqual([
      ['LEFT($C3,6)="passes"', 'FFD5E8E4'],
      ['OR(LEFT($C3,5)="fails",LEFT($C3,6)="cannot")', 'FFF8DAD3'],
    ])
    expect(column('Verdict')).toBe(3)
    for (const row of rows) expect(cached(cell(row, 'Verdict'))).toBe(row.values!.verdict)
  })

  it('sums up the link cases by formulas over their lines', () => {
    const sums = cellsBeside(book.getWorksheet('Link cases')!, 'C/N0', 'F').map(cell => valueOf(book, 'Link cases', cell) as number)
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
    const sentence = 'cannot be computed: QAM has a power of two of points from 4 to 4096.'
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
    // The ends of intervals stand behind the grid's columns.
    expect(head.slice(0, columns.length)).toEqual(columns.map(headerOf))
    const { body: study } = await owner.get<{ requirements: never }>(`/api/studies/${ridge}`)
    const context = { reference: rows.find(({ inputs }) => inputs.role === 'reference') ?? null, requirements: study.requirements }
    expect(lines.map(line => line.slice(0, columns.length))).toEqual(rows.map(row => columns.map((column) => {
      const value = column.value(row, context)
      return value === null ? '' : String(value)
    })))
  })

  it('the JSON has every row as the API gives it', async () => {
    const { body } = await owner.get<{ candidates: Candidate[] }>(`/api/studies/${ridge}/export.json`)
    expect(body.candidates).toEqual(rows.map(({ id, version, pin, inputs, state, errors, values, parts }) => ({ id, version, pin, inputs, state, errors, values, parts })))
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
