import type { z } from 'zod'
import type { Issue } from '#shared/schemas/common'

type ZodIssue = z.core.$ZodIssue

/** Most mistakes told in one answer. */
const mostIssues = 100

/** One issue of zod as mistakes of ours: unknown fields are named one by one, and a union tells what its nearest member says. */
function flatten(issue: ZodIssue): ZodIssue[] {
  if (issue.code === 'unrecognized_keys') {
    return issue.keys.slice(0, mostIssues).map(key => ({ ...issue, path: [...issue.path, key], message: 'This field does not exist.' }))
  }
  if (issue.code === 'invalid_union' && issue.errors.length > 0 && issue.errors.every(errors => errors.length > 0)) {
    const depth = (errors: ZodIssue[]) => Math.max(...errors.map(e => e.path.length))
    const nearest = issue.errors.reduce((best, errors) => depth(errors) > depth(best) || (depth(errors) === depth(best) && errors.length < best.length) ? errors : best)
    if (depth(nearest) === 0 && nearest[0]!.code === 'invalid_type') return [issue]
    return nearest.flatMap(inner => flatten({ ...inner, path: [...issue.path, ...inner.path] }))
  }
  return [issue]
}

/** A path as the API writes it: `items.3.order`; empty for the whole body. */
export const pathText = (path: readonly PropertyKey[]) => path.map(String).join('.')

/** Mistakes found by a schema, the first hundred, each told once with its path and a sentence that says what is allowed. */
export function issuesOf(error: z.core.$ZodError): Issue[] {
  const issues = error.issues.slice(0, mostIssues).flatMap(flatten).map(({ path, message }): Issue => ({ path: pathText(path), message }))
  // One number can miss its limits in two ways, with one sentence for both.
  return [...new Map(issues.map(issue => [`${issue.path} ${issue.message}`, issue])).values()].slice(0, mostIssues)
}
