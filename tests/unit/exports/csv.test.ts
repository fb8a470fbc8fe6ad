import { expect, it } from 'vitest'
import { defaultRequirements } from '#shared/schemas/requirements'
import { csvOf } from '../../../server/exports/csv'
import type { StudyExport } from '../../../server/exports/study-export'
import { sampleRow } from '../columns/sample-row'

async function lineOf(name: string): Promise<string> {
  const rows = async function* () {
    yield [sampleRow({}, { name })]
  }
  const data = { reference: null, study: { requirements: defaultRequirements }, rows } as unknown as StudyExport
  const parts: string[] = []
  for await (const part of csvOf(data)) parts.push(part)
  return parts[1]!
}

it.each([
  ['of one line', '=1+1', '"\'=1+1"'],
  ['of two lines', '=HYPERLINK("x")\nb', '"\'=HYPERLINK(""x"")\nb"'],
  ['behind a space', ' @a', '"\' @a"'],
])('writes an apostrophe before a formula %s', async (_, name, written) => expect(await lineOf(name)).toContain(written))
