import { randomBytes } from 'node:crypto'
import { overHttps } from '../utils/base-url'

const common = 'img-src \'self\' data: blob:; object-src \'none\'; base-uri \'none\'; form-action \'self\'; frame-ancestors \'none\''

/** The pages' content security policy. Vite's development server writes tags and a socket of its own. */
const policyOf = (nonce: string) => import.meta.dev
  ? `default-src 'self'; script-src 'self' 'unsafe-inline' 'unsafe-eval'; style-src 'self' 'unsafe-inline'; connect-src 'self' ws: wss:; ${common}`
  : `default-src 'self'; script-src 'self' 'nonce-${nonce}'; style-src 'self' 'nonce-${nonce}'; style-src-attr 'unsafe-inline'; ${common}`

const headers = {
  'x-content-type-options': 'nosniff',
  'referrer-policy': 'same-origin',
  'permissions-policy': 'camera=(), geolocation=(), microphone=(), payment=(), usb=()',
  'cross-origin-opener-policy': 'same-origin',
  'cross-origin-resource-policy': 'same-origin',
  'x-frame-options': 'DENY',
}

const withNonce = (parts: string[], nonce: string) => parts.map(part => part.replace(/<(script|style|link)(?=[\s>])/g, `<$1 nonce="${nonce}"`))

/** Headers that keep a page to itself, and the nonce of its own script and style tags. */
export default defineNitroPlugin((nitro) => {
  nitro.hooks.hook('request', (event) => {
    setResponseHeaders(event, headers)
    if (overHttps()) setResponseHeader(event, 'strict-transport-security', 'max-age=31536000; includeSubDomains')
    const api = event.path.startsWith('/api')
    if (api) setResponseHeader(event, 'cache-control', 'no-store')
    const nonce = randomBytes(16).toString('base64')
    event.context.nonce = nonce
    setResponseHeader(event, 'content-security-policy', api ? 'default-src \'none\'; frame-ancestors \'none\'' : policyOf(nonce))
    // The router knows no HEAD: it is a GET whose body Node leaves out.
    if (api && event.node.req.method === 'HEAD') {
      event.node.req.method = 'GET'
      event.context.head = true
    }
  })

  // Which framework answers is nobody's business.
  nitro.hooks.hook('render:response', (response) => {
    delete response.headers?.['x-powered-by']
  })

  // The body is left alone: whatever it came from, only tags of the frame are ours.
  nitro.hooks.hook('render:html', (html, { event }) => {
    const nonce = event.context.nonce
    if (!nonce || import.meta.dev) return
    html.head = withNonce(html.head, nonce)
    html.bodyPrepend = withNonce(html.bodyPrepend, nonce)
    html.bodyAppend = withNonce(html.bodyAppend, nonce)
  })
})
