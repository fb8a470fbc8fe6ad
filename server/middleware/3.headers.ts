import { randomBytes } from 'node:crypto'
import { setHeader } from 'h3'
import { settings } from '../utils/settings'

const policy = (nonce: string) => [
  'default-src \'self\'',
  `script-src 'self' 'nonce-${nonce}'`,
  // Vite's development server puts style tags into the page by itself.
  import.meta.dev ? 'style-src \'self\' \'unsafe-inline\'' : `style-src 'self' 'nonce-${nonce}'`,
  'style-src-attr \'unsafe-inline\'',
  'img-src \'self\' data: blob:',
  'object-src \'none\'', 'base-uri \'none\'', 'form-action \'self\'', 'frame-ancestors \'none\'',
  ...(import.meta.dev ? ['connect-src \'self\' ws: wss:'] : []),
].join('; ')

/** Headers that keep a browser from doing with our answers what they are not meant for; answers of the API are not stored. */
export default defineEventHandler((event) => {
  const nonce = randomBytes(16).toString('base64')
  event.context.nonce = nonce
  setHeader(event, 'content-security-policy', policy(nonce))
  setHeader(event, 'x-content-type-options', 'nosniff')
  setHeader(event, 'x-frame-options', 'DENY')
  setHeader(event, 'referrer-policy', 'same-origin')
  setHeader(event, 'permissions-policy', 'camera=(), microphone=(), geolocation=(), payment=(), usb=()')
  setHeader(event, 'cross-origin-opener-policy', 'same-origin')
  setHeader(event, 'cross-origin-resource-policy', 'same-origin')
  if (settings.secure) setHeader(event, 'strict-transport-security', 'max-age=31536000')
  if (event.path.startsWith('/api/')) setHeader(event, 'cache-control', 'no-store')
})
