import type { Candidate } from '#shared/schemas/candidates'

/** Verdict in words; for a row without numbers, why it has none, as the grid says it. */
export function verdictText(row: Candidate): string {
  if (row.values) return row.values.verdict
  if (row.state === 'computing') return 'being computed'
  return `cannot be computed: ${row.errors.map(e => e.message).join(' ')}`
}
