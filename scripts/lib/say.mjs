/** A condition that ends a command with one clear sentence and exit code 1, without a stack trace. */
export class Refusal extends Error {
  name = 'Refusal'
}

/**
 * Says on standard output what a command is doing.
 * @param {string} text one line
 */
export function say(text) {
  process.stdout.write(`${text}\n`)
}

/**
 * The sentence for something thrown: a refusal's own words, anything else with its stack.
 * @param {unknown} thrown
 * @returns {string}
 */
export function sentenceOf(thrown) {
  if (thrown instanceof Refusal) return thrown.message
  return thrown instanceof Error ? thrown.stack ?? thrown.message : String(thrown)
}

/**
 * The system's code of a failed call, such as ENOENT.
 * @param {unknown} thrown
 * @returns {string}
 */
export function codeOf(thrown) {
  return thrown instanceof Error && 'code' in thrown ? String(thrown.code) : ''
}
