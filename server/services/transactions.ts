import { useDatabase } from '../database/client'
import type { Transaction } from '../database/client'

/** Deadlock, and lock wait timeout: the database has undone the transaction, and asks to try again. */
const retried = new Set(['ER_LOCK_DEADLOCK', 'ER_LOCK_WAIT_TIMEOUT'])
const attempts = 4

/** The driver's code of an error, which Drizzle wraps. */
function codeOf(error: unknown): unknown {
  if (!(error instanceof Error)) return undefined
  return 'code' in error ? error.code : codeOf(error.cause)
}

/** Runs a transaction, and again when the database has undone it in favour of another one. */
export async function transact<T>(work: (tx: Transaction) => Promise<T>): Promise<T> {
  for (let attempt = 1; ; attempt++) {
    try {
      return await useDatabase().transaction(work)
    } catch (error) {
      if (attempt === attempts || !retried.has(String(codeOf(error)))) throw error
    }
  }
}
