import { createConnection } from 'mysql2/promise'
import type { Connection } from 'mysql2/promise'
import { afterAll, beforeAll, inject } from 'vitest'

/** A connection with the application's account, or the administrating one, for the tests of a file. */
export function databaseConnection(as: 'application' | 'administrator' = 'application'): () => Connection {
  let connection: Connection | undefined
  beforeAll(async () => {
    connection = await createConnection({ uri: inject(as === 'application' ? 'databaseUrl' : 'databaseAdminUrl'), timezone: 'Z' })
  })
  afterAll(() => connection?.end())
  return () => {
    if (!connection) throw new Error('The connection is there within tests only.')
    return connection
  }
}
