import { FetchError } from 'ofetch'
import type { Problem } from '#shared/schemas/common'

type Query = Record<string, string | number | boolean | undefined>
type Options = { query?: Query, version?: number, signal?: AbortSignal }
type Method = 'GET' | 'POST' | 'PATCH' | 'PUT' | 'DELETE'

const problemOf = (thrown: unknown): unknown => {
  if (!(thrown instanceof FetchError)) return thrown
  const wait = Number(thrown.response?.headers.get('retry-after'))
  return new ApiProblem(thrown.response?.status ?? 0, thrown.data as Partial<Problem> | undefined, wait > 0 ? wait : null)
}

/**
 * The API as pages call it: JSON in, JSON out, refusals thrown as ApiProblem.
 * `version` becomes If-Match. While rendering on the server the reader's cookies go along.
 * An ended session leads to the sign-in page, and back from there.
 */
export function useApi() {
  const request = useRequestFetch() as typeof $fetch
  const router = useRouter()
  const { session } = useUserSession()

  const call = async <T>(method: Method, url: string, body: object | undefined, { query, version, signal }: Options): Promise<T> => {
    try {
      return await request<unknown>(url, {
        method, body, query, signal, retry: 0,
        headers: version === undefined ? {} : { 'if-match': `"${version}"` },
      }) as T
    } catch (thrown) {
      const problem = problemOf(thrown)
      const here = router.currentRoute.value
      if (import.meta.client && problem instanceof ApiProblem && problem.status === 401 && here.path !== '/sign-in') {
        session.value = null
        await router.push({ path: '/sign-in', query: { to: here.fullPath } })
      }
      throw problem
    }
  }

  return {
    get: <T>(url: string, options: Options = {}) => call<T>('GET', url, undefined, options),
    post: <T>(url: string, body?: object, options: Options = {}) => call<T>('POST', url, body, options),
    patch: <T>(url: string, body: object, options: Options = {}) => call<T>('PATCH', url, body, options),
    put: <T>(url: string, body: object, options: Options = {}) => call<T>('PUT', url, body, options),
    delete: <T>(url: string, options: Options = {}) => call<T>('DELETE', url, undefined, options),
  }
}
