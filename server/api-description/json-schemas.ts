import { z } from 'zod'
import { activityEntry } from '#shared/schemas/activity'
import { candidate, candidateChange } from '#shared/schemas/candidates'
import { issue, problem } from '#shared/schemas/common'
import { evaluation, evaluationAnswer } from '#shared/schemas/evaluate'
import { member } from '#shared/schemas/members'
import { person } from '#shared/schemas/people'
import { requirements } from '#shared/schemas/requirements'
import { account, token } from '#shared/schemas/session'
import { study, studySummary } from '#shared/schemas/studies'
import { sweep, sweepCreation } from '#shared/schemas/sweeps'
import { candidateConstellation, candidateCurves, candidateValues } from '#shared/schemas/values'

/** JSON Schema 2020-12 as a plain object, which is what OpenAPI 3.1 takes. */
export type JsonSchema = Record<string, unknown>

/** Whether a schema describes what is sent to us or what we answer: defaults and conversions lie between the two. */
export type Direction = 'input' | 'output'

/** Schemas that are told once and referred to by their names. */
const named: Record<Direction, Record<string, z.ZodType>> = {
  output: {
    Account: account, ActivityEntry: activityEntry, Candidate: candidate, CandidateConstellation: candidateConstellation, CandidateCurves: candidateCurves,
    CandidateValues: candidateValues, EvaluationAnswer: evaluationAnswer, Issue: issue, Member: member, Person: person, Problem: problem, Requirements: requirements,
    Study: study, StudySummary: studySummary, Sweep: sweep, Token: token,
  },
  input: { CandidateChange: candidateChange, Evaluation: evaluation, RequirementsInput: requirements, SweepCreation: sweepCreation },
}

const uri = (id: string) => `#/components/schemas/${id}`

/** A generated schema without what only stands at the head of a document of its own. */
function bare(schema: JsonSchema): JsonSchema {
  return Object.fromEntries(Object.entries(schema).filter(([key]) => !['$schema', '$id', 'id', '~standard'].includes(key)))
}

/** Schemas of one direction as JSON Schema, and the reference by which each is told. */
export interface DescribedSchemas {
  schemas: Record<string, JsonSchema>
  referTo: (schema: z.ZodType) => JsonSchema
}

/**
 * Describes the named schemas and further ones, each once; wherever one occurs in another one it is told by reference.
 * @param further by name; those that have a name already keep it
 */
export function describeSchemas(io: Direction, further: Record<string, z.ZodType>): DescribedSchemas {
  const registry = z.registry<{ id: string }>()
  for (const [id, schema] of [...Object.entries(named[io]), ...Object.entries(further)]) {
    if (!registry.has(schema)) registry.add(schema, { id })
  }
  const { schemas } = z.toJSONSchema(registry, { io, uri })
  return {
    schemas: Object.fromEntries(Object.entries(schemas).map(([id, schema]) => [id, bare(schema)])),
    referTo: schema => ({ $ref: uri(registry.get(schema)?.id ?? '') }),
  }
}
