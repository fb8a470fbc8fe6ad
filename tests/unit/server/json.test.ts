import { describe, expect, it } from 'vitest'
import { fromJson } from '../../../server/utils/json'
import type { Refusal } from '../../../server/utils/problem'

const refusal = (text: string) => {
  try {
    return fromJson(text)
  } catch (error) {
    return (error as Error).message
  }
}

const parts = (text: string) => {
  try {
    fromJson(text)
  } catch (error) {
    const { statusCode, parts } = error as Refusal
    return { status: statusCode, errors: parts.errors }
  }
}

describe('the JSON of a body', () => {
  it('may have 32 levels', () => expect(fromJson(`${'['.repeat(32)}${']'.repeat(32)}`)).toHaveLength(1))
  it('may not have 33', () => expect(refusal(`${'['.repeat(33)}${']'.repeat(33)}`)).toBe('A body has at most 32 levels of lists and objects.'))
  it('counts no brackets in its text', () => expect(fromJson(JSON.stringify(`\\"${'['.repeat(40)}`))).toHaveLength(42))
  it.each(['\\ud800', '\\u0000', '\\f', '\\ufffe', '\uFFFF'])('may not have %j in its text', character =>
    expect(refusal(`{"name":"a${character}"}`)).toBe('Enter text without control characters; tabs and line ends are allowed.'))
  it('that is no text is refused with its places', () => {
    expect(parts('{"items":[{"note":"fine"},{"note":"\\u0007"},{"\\u0000":1}]}')?.errors?.map(error => error.path)).toEqual(['items.1.note', 'items.2'])
  })
  it('that is no text is an input that is not allowed', () => expect(parts('"\\ud800"')?.status).toBe(422))
  it('may have tabs and line ends', () => expect(fromJson('"\\u0009\\r\\n"')).toBe('\t\r\n'))
  it('may write a whole pair by its escapes', () => expect(fromJson('"\\ud83d\\ude00"')).toBe('😀'))
  it('may speak of an escape', () => expect(fromJson('"\\\\ud800"')).toBe('\\ud800'))
})
