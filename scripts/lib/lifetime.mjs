import process from 'node:process'
import { constants } from 'node:os'
import { sentenceOf } from './say.mjs'

/**
 * What a command has started, and the one way to end it.
 * @typedef {object} Lifetime
 * @property {(close: () => unknown) => () => void} closing registers what has to be closed at the end (last in, first out);
 *   the answer takes it off the list
 * @property {(code: number, sentence?: string) => Promise<never>} end closes everything once and exits; a part of a life only says the sentence
 * @property {() => void} settled from here on a signal is the normal way to end: exit code 0
 * @property {boolean} ending whether the end has begun
 */

/**
 * Installs the signal handlers of a command. A terminal sends SIGINT to npm and to us, and npm passes it on: the second is ignored.
 * @returns {Lifetime}
 */
export function beginLifetime() {
  /** @type {Set<() => unknown>} */
  const closers = new Set()
  /** @type {Promise<never> | undefined} */
  let end
  let normal = false

  /** @type {Lifetime} */
  const lifetime = {
    ending: false,
    closing(close) {
      closers.add(close)
      return () => closers.delete(close)
    },
    end(code, sentence) {
      lifetime.ending = true
      end ??= closeAll(closers, code, sentence)
      return end
    },
    settled() {
      normal = true
    },
  }

  for (const signal of /** @type {const} */ (['SIGINT', 'SIGTERM', 'SIGHUP'])) {
    process.on(signal, () => void lifetime.end(normal ? 0 : 128 + constants.signals[signal]))
  }
  if (process.env.npm_lifecycle_event) endWithParent(lifetime)
  return lifetime
}

/**
 * A part of a process's life, for a test run or a measurement inside a process that others govern: it installs nothing and exits nothing.
 * @returns {Lifetime & { close: () => Promise<void> }}
 */
export function beginPart() {
  /** @type {Set<() => unknown>} */
  const closers = new Set()
  const part = {
    ending: false,
    closing(/** @type {() => unknown} */ close) {
      closers.add(close)
      return () => closers.delete(close)
    },
    end(/** @type {number} */ code, /** @type {string | undefined} */ sentence) {
      if (!part.ending) process.stderr.write(`${sentence}\n`)
      return /** @type {Promise<never>} */ (new Promise(() => {}))
    },
    settled() {},
    async close() {
      part.ending = true
      await closeEach(closers)
    },
  }
  return part
}

/**
 * Runs a command's body; what it throws becomes one sentence and exit code 1.
 * @param {(lifetime: Lifetime) => Promise<unknown>} body
 */
export async function command(body) {
  const lifetime = beginLifetime()
  try {
    await body(lifetime)
  } catch (thrown) {
    // A child that ends because we are ending is no news.
    await (lifetime.ending ? lifetime.end(0) : lifetime.end(1, sentenceOf(thrown)))
  }
}

/**
 * @param {Set<() => unknown>} closers
 * @param {number} code
 * @param {string} [sentence]
 * @returns {Promise<never>}
 */
async function closeAll(closers, code, sentence) {
  if (sentence) process.stderr.write(`${sentence}\n`)
  await closeEach(closers)
  process.exit(code)
}

/**
 * @param {Set<() => unknown>} closers last in, first out
 */
async function closeEach(closers) {
  for (const close of [...closers].reverse()) {
    try {
      await close()
    } catch (thrown) {
      process.stderr.write(`${sentenceOf(thrown)}\n`)
    }
  }
}

/**
 * npm killed with SIGKILL cannot pass anything on: notice that our parent has changed, and end.
 * @param {Lifetime} lifetime
 */
function endWithParent(lifetime) {
  const parent = process.ppid
  setInterval(() => {
    if (process.ppid !== parent) void lifetime.end(1)
  }, 250).unref()
}
