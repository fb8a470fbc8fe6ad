import { baseUrl } from '../utils/base-url'

const safe = new Set(['GET', 'HEAD', 'OPTIONS'])

/** Refuses changes that another site's page asks for: the browser says where a request comes from. */
export default defineEventHandler((event) => {
  if (safe.has(event.method)) return
  const { origin, host, 'sec-fetch-site': site } = event.node.req.headers
  const ours = origin === undefined
    ? site === undefined || site === 'same-origin' || site === 'none'
    : URL.canParse(origin) && (new URL(origin).host === host || origin === baseUrl()?.origin)
  if (!ours) problem(403, 'This request comes from another site\'s page.')
})
