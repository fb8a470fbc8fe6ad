import type { Candidate, CandidateChange } from '#shared/schemas/candidates'

/** What became of an edit that is not, or not yet, what the server holds. A saved cell has no such state. */
export type CellSave
  = | { state: 'saving', text: string }
  /** not allowed: the typed text stays, with the sentence that says what is allowed */
    | { state: 'refused', text: string, sentence: string }
  /** somebody else changed the row first: both values are offered */
    | { state: 'conflict', text: string, change: CandidateChange, theirs: string, sentence: string }
  /** no answer came: nothing is known to be saved */
    | { state: 'failed', text: string, change: CandidateChange, sentence: string }

export type CellKey = `${string} ${string}`
export const cellKey = (row: string, column: string): CellKey => `${row} ${column}`
export const partsOf = (key: CellKey) => {
  const [row = '', column = ''] = key.split(' ')
  return { row, column }
}

/** Inputs that no computed cell depends on: changing them leaves numbers fresh. */
const idle: ReadonlySet<string> = new Set(['name', 'note', 'role', 'roleReason', 'enteredSource'])

/** Whether a change makes the row's numbers stale. */
export const touchesNumbers = (change: CandidateChange) => Object.keys(change).some(field => !idle.has(field))

/** The row as the server has it, out of a stale change's answer. */
export const isCandidate = (value: unknown): value is Candidate =>
  typeof value === 'object' && value !== null && 'inputs' in value && 'version' in value && 'id' in value
