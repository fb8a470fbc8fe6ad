import { describe, expect, it } from 'vitest'
import { fromJson } from '../../../server/utils/json'

const refusal = (text: string) => {
  try {
    return fromJson(text)
  } catch (error) {
    return (error as Error).message
  }
}

describe('the JSON of a body', () => {
  it('may have 32 levels', () => expect(fromJson(`${'['.repeat(32)}${']'.repeat(32)}`)).toHaveLength(1))
  it('may not have 33', () => expect(refusal(`${'['.repeat(33)}${']'.repeat(33)}`)).toBe('A body has at most 32 levels of lists and objects.'))
  it('counts no brackets in its text', () => expect(fromJson(JSON.stringify(`\\"${'['.repeat(40)}`))).toHaveLength(42))
  it.each(['\\ud800', '\\u0000', '\\f', '\\ufffe', '\uFFFF'])('may not have %j in its text', character =>
    expect(refusal(`{"name":"a${character}"}`)).toBe('The body has control characters or others that no text has.'))
  it('may have tabs and line ends', () => expect(fromJson('"\\u0009\\r\\n"')).toBe('\t\r\n'))
  it('may write a whole pair by its escapes', () => expect(fromJson('"\\ud83d\\ude00"')).toBe('😀'))
  it('may speak of an escape', () => expect(fromJson('"\\\\ud800"')).toBe('\\ud800'))
})
