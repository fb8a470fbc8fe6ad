import { z } from 'zod'

const formula = z.object({
  /** what it is for, where there are several */
  case: z.string().nullable(),
  tex: z.string(),
  /** set by KaTeX: HTML to look at, MathML to be read out */
  html: z.string(),
})

const columnOfMethod = z.object({
  id: z.string(),
  /** title with its unit, as the grid's header reads */
  title: z.string(),
  meaning: z.string(),
  formula: z.string(),
  tolerance: z.string(),
})

const checkOfMethod = z.object({
  id: z.string(),
  what: z.string(),
  unit: z.string().nullable(),
  /** as printed, or a published closed form evaluated */
  published: z.string(),
  /** number of the source in the list of sources, from 1 */
  source: z.int(),
  place: z.string().nullable(),
  fromMemory: z.boolean(),
  tolerance: z.string(),
})

const method = z.object({
  id: z.string(),
  title: z.string(),
  text: z.string(),
  formulas: z.array(formula),
  /** numbers in the list of sources, from 1 */
  sources: z.array(z.int()),
  tolerance: z.string().nullable(),
  columns: z.array(columnOfMethod),
  checks: z.array(checkOfMethod),
})

/** Body of GET /api/methods. */
export const methodsAnswer = z.object({
  sections: z.array(z.object({ number: z.int(), title: z.string(), methods: z.array(method) })),
  /** columns that are entered, in the grid's order */
  entered: z.array(z.object({ id: z.string(), title: z.string(), meaning: z.string() })),
  sources: z.array(z.string()),
})
export type MethodsAnswer = z.infer<typeof methodsAnswer>
export type MethodOfAnswer = z.infer<typeof method>

/** Body of GET /api/methods/checks: what this build computes for each published value. */
export const checksAnswer = z.object({
  coreVersion: z.string(),
  items: z.array(z.object({
    id: z.string(),
    published: z.number(),
    computed: z.number(),
    difference: z.number(),
    /** largest difference allowed, in the value's own unit */
    allowed: z.number(),
    holds: z.boolean(),
  })),
})
export type ChecksAnswer = z.infer<typeof checksAnswer>
