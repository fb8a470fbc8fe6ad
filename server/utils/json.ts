import { problem } from './problem'

/** Most levels of lists and objects in a body; none that the API reads has a third of it. */
const mostLevels = 32

/**
 * A body's JSON.
 * @throws 400 when it is empty, not well formed, nested deeper than any body is, or has what is no text in its strings
 */
export function fromJson(text: string): unknown {
  if (text.trim() === '') problem(400, 'Send a JSON body.')
  // Millions of levels would be seconds of work for whoever looks at them.
  if (levelsOf(text) > mostLevels) problem(400, `A body has at most ${mostLevels} levels of lists and objects.`)
  const value = parse(text)
  if (suspicious.test(text) && noText.test(JSON.stringify(value))) problem(400, 'The body has control characters or others that no text has.')
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
