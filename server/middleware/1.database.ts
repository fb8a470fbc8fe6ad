import { databaseTrouble } from '../database/ready'
import { problem } from '../utils/problem'

/** While there is no database the API says so; health says it in its own words. */
export default defineEventHandler((event) => {
  if (!event.path.startsWith('/api/') || event.path.startsWith('/api/health')) return
  const trouble = databaseTrouble()
  if (trouble) problem(503, trouble, { headers: { 'retry-after': '2' } })
})
