import { version } from '../../package.json'
import { checkDatabase, databaseReason } from '../database/ready'

/** GET /api/health: whether the server and its database work. */
export default defineEventHandler(async () => {
  if (await checkDatabase() !== 'ok') problem(503, databaseReason(), { headers: { 'retry-after': '2' } })
  return { status: 'ok', version, database: 'ok' }
})
