import type { z } from 'zod'

/** What the description says about one route beyond its rule. */
export interface Operation {
  summary: string
  /** group in the description */
  tag: 'Session' | 'Account' | 'People' | 'Studies' | 'Candidates' | 'Sweeps' | 'Searches' | 'Exports' | 'Evaluation' | 'Methods' | 'Server'
  query?: z.ZodObject
  body?: z.ZodType
  /** status of success; 200 unless said */
  status?: 200 | 201 | 202 | 204
  /** JSON of success */
  answer?: z.ZodType
  /** media type of success that is no JSON of ours */
  media?: string
  /** whether the change names its version by If-Match */
  versioned?: true
  /** further refusals, each with what it means */
  refusals?: Partial<Record<401 | 409 | 422 | 429, string>>
}

/** Says of each operation to which route it belongs. */
export const tagged = <Key extends string>(tag: Operation['tag'], operations: Record<Key, Omit<Operation, 'tag'>>): Record<Key, Operation> => {
  const entries = Object.entries<Omit<Operation, 'tag'>>(operations).map(([route, operation]) => [route, { tag, ...operation }])
  return Object.fromEntries(entries)
}
