import { z } from 'zod'

type RawIssue = z.core.$ZodRawIssue

const kinds: Partial<Record<string, string>> = { array: 'a list', int: 'a whole number', object: 'an object', boolean: 'true or false', string: 'text', number: 'a number' }
const counted: Partial<Record<string, string>> = { array: ' items', string: ' characters' }

/** A limit that a value misses, as a sentence. */
function limit(words: 'at least' | 'at most', bound: number | bigint, inclusive: boolean | undefined, origin: string): string {
  const exclusive = { 'at least': 'more than', 'at most': 'less than' }[words]
  return `Send ${inclusive === false ? exclusive : words} ${bound.toLocaleString('en')}${counted[origin] ?? ''} here.`
}

/** What is allowed, for a mistake that its schema has no sentence for: zod's own words never reach a reader. */
export function plainSentence(issue: RawIssue): string {
  switch (issue.code) {
    case 'invalid_type': return issue.input === undefined ? 'This field is missing.' : `Send ${kinds[issue.expected as string] ?? `a ${issue.expected}`} here.`
    case 'too_small': return limit('at least', issue.minimum as number, issue.inclusive, issue.origin as string)
    case 'too_big': return limit('at most', issue.maximum as number, issue.inclusive, issue.origin as string)
    case 'invalid_value': return `Send ${issue.values.length > 1 ? 'one of ' : ''}${issue.values.map(String).join(', ')} here.`
    case 'unrecognized_keys': return 'This field does not exist.'
    default: return 'This value is not of a kind that is allowed here.'
  }
}

z.config({ customError: plainSentence })
