import { pathText } from '../errors/issues'
import { problem } from './problem'

/** Most levels of lists and objects in a body; none that the API reads has a third of it. */
const mostLevels = 32

/**
 * A body's JSON.
 * @throws 400 when it is empty, not well formed, or nested deeper than any body is; 422 with the places where its strings are no text
 */
export function fromJson(text: string): unknown {
  if (text.trim() === '') problem(400, 'Send a JSON body.')
  // Millions of levels would be seconds of work for whoever looks at them.
  if (levelsOf(text) > mostLevels) problem(400, `A body has at most ${mostLevels} levels of lists and objects.`)
  const value = parse(text)
  if (suspicious.test(text)) {
    const errors = placesWithoutText(value, []).slice(0, mostPlaces).map(place => ({ path: pathText(place), message: notText }))
    if (errors.length > 0) problem(422, notText, { errors })
  }
  return value
}

function parse(text: string): unknown {
  try {
    return JSON.parse(text)
  } catch {
    return problem(400, 'The body is not well-formed JSON.')
  }
}

/*
 * Half a surrogate pair is refused by the database in JSON; control characters but tab and line ends, U+FFFE and U+FFFF are none of
 * XML, and one of them would spoil a workbook. JSON.stringify leaves all of these but the last two, and nothing else, as \b, \f or \u.
 */
const suspicious = /\\[ubf]|[\uFFFE\uFFFF]/
const noText = /(?<!\\)(?:\\\\)*\\[ubf]|[\uFFFE\uFFFF]/
const notText = 'Enter text without control characters; tabs and line ends are allowed.'
/** Most places told in one answer. */
const mostPlaces = 100

/** Where strings are no text; a field whose name is none stands for its object. */
function placesWithoutText(value: unknown, place: readonly string[]): (readonly string[])[] {
  if (typeof value === 'string') return noText.test(JSON.stringify(value)) ? [place] : []
  if (typeof value !== 'object' || value === null) return []
  return Object.entries(value).flatMap(([key, inner]) => noText.test(JSON.stringify(key)) ? [place] : placesWithoutText(inner, [...place, key]))
}

const [quote, backslash, openList, closeList, openObject, closeObject] = [...'"\\[]{}'].map(mark => mark.charCodeAt(0))

/** Levels of lists and objects, counted until there are too many. */
function levelsOf(text: string): number {
  let level = 0
  let deepest = 0
  let quoted = false
  for (let i = 0; i < text.length && deepest <= mostLevels; i++) {
    const code = text.charCodeAt(i)
    if (quoted && code === backslash) i++
    else if (code === quote) quoted = !quoted
    else if (!quoted && (code === openList || code === openObject)) deepest = Math.max(deepest, ++level)
    else if (!quoted && (code === closeList || code === closeObject)) level--
  }
  return deepest
}
