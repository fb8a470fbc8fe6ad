import { databaseReason, databaseState } from '../database/ready'
import { waitingPage } from '../utils/waiting-page'

/** While the database is not there, the API but for its health answers 503, and so does every page. */
export default defineEventHandler((event) => {
  if (databaseState() === 'ok') return
  const path = event.path.split('?')[0]!
  if (path === '/api/health' || path === '/api/openapi.json') return
  if (path === '/api' || path.startsWith('/api/')) problem(503, databaseReason(), { headers: { 'retry-after': '2' } })
  setResponseStatus(event, 503)
  setResponseHeaders(event, { 'retry-after': 2, 'content-type': 'text/html;charset=utf-8', 'cache-control': 'no-store' })
  return waitingPage(databaseReason(), event.context.nonce)
})
