import Papa from 'papaparse'
import { expect, it } from 'vitest'
import { defaultRequirements } from '#shared/schemas/requirements'
import { csvOf } from '../../../server/exports/csv'
import type { StudyExport } from '../../../server/exports/study-export'
import { sampleRow } from '../columns/sample-row'

async function partsOf(name: string): Promise<string[]> {
  const rows = async function* () {
    yield [sampleRow({}, { name })]
  }
  const data = { reference: null, study: { requirements: defaultRequirements }, rows } as unknown as StudyExport
  const parts: string[] = []
  for await (const part of csvOf(data)) parts.push(part)
  return parts
}
const lineOf = async (name: string) => (await partsOf(name))[1]!

it.each([
  ['of one line', '=1+1', '"\'=1+1"'],
  ['of two lines', '=HYPERLINK("x")\nb', '"\'=HYPERLINK(""x"")\nb"'],
  ['behind a space', ' @a', '"\' @a"'],
])('writes an apostrophe before a formula %s', async (_, name, written) => expect(await lineOf(name)).toContain(written))

it.each([
  ['writes the ends of an interval', 'SER at available, directional', ['1e-9', '9.8e-10', '1.02e-9']],
  ['leaves the ends of an exact number empty', 'Surplus, dB', ['-0.14', '', '']],
])('%s', async (_, header, written) => {
  const [head, line] = Papa.parse<string[]>((await partsOf('a')).join('').trimEnd()).data as [string[], string[]]
  expect(['', ', low', ', high'].map(end => line[head.indexOf(`${header}${end}`)])).toEqual(written)
})
