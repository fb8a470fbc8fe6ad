import { rules } from './rules'
import type { Rule } from './rules'

/** The rule of a request, and what stands in its path for the rule's parameters. */
export interface Match {
  /** key of the rules, such as `GET /api/studies/:id` */
  route: string
  rule: Rule
  params: Record<string, string>
}

interface Pattern { method: string, route: string, rule: Rule, parts: string[] }

const partsOf = (path: string) => path.split('/').slice(1)

const patterns: Pattern[] = Object.entries<Rule>(rules).map(([route, rule]) => {
  const [method = '', path = ''] = route.split(' ')
  return { method, route, rule, parts: partsOf(path) }
// A path written out goes before one with a parameter in its place, as in the router.
}).sort((a, b) => Number(a.route.includes(':')) - Number(b.route.includes(':')))

function paramsOf(pattern: Pattern, parts: string[]): Record<string, string> | null {
  if (parts.length !== pattern.parts.length) return null
  const params: Record<string, string> = {}
  for (const [i, part] of parts.entries()) {
    const expected = pattern.parts[i]!
    if (expected.startsWith(':') && part !== '') params[expected.slice(1)] = part
    else if (expected !== part) return null
  }
  return params
}

/**
 * The rule of a request.
 * @param path without query, decoded as the router sees it
 * @returns the match; the methods that the path allows when it is not this one; null when no route has the path
 */
export function matchRoute(method: string, path: string): Match | { allow: string[] } | null {
  const parts = partsOf(path)
  const allow: string[] = []
  for (const pattern of patterns) {
    const params = paramsOf(pattern, parts)
    if (!params) continue
    if (pattern.method === method) return { route: pattern.route, rule: pattern.rule, params }
    allow.push(pattern.method)
  }
  return allow.length > 0 ? { allow } : null
}
