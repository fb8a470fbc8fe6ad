import { createConnection } from 'mysql2/promise'
import type { Connection, RowDataPacket } from 'mysql2/promise'
import { connectionOptions } from './client'

/** What the application may do with a table; activity is only ever added to. */
const rightsOn = (table: string) => table === 'activity' ? 'select, insert' : 'select, insert, update, delete'

/** Error of a REVOKE for rights that were never given. */
const nothingToRevoke = 1141

/**
 * Gives the application's account its rights table by table. There are no negative grants, so rights on the whole database,
 * which would include changing activity, are taken away after that.
 * @param admin connection that may grant
 * @param database name
 * @param url address with the application's account
 */
export async function grantTables(admin: Connection, database: string, url: string): Promise<void> {
  const account = await accountOf(url)
  if (account === await currentAccount(admin)) return
  const who = account.split('@').map(part => admin.escape(part)).join('@')
  const [tables] = await admin.query<RowDataPacket[]>(
    'select table_name as name from information_schema.tables where table_schema = ? and table_type = \'BASE TABLE\' and table_name <> \'migrations\'', [database],
  )
  for (const { name } of tables) await admin.query(`grant ${rightsOn(name)} on ??.?? to ${who}`, [database, name])
  try {
    await admin.query(`revoke select, insert, update, delete on ??.* from ${who}`, [database])
  } catch (error) {
    if (!(error instanceof Error && 'errno' in error && error.errno === nothingToRevoke)) throw error
  }
}

/** The account under which the server knows who connects, as user@host; without a database, as it may have no right on one yet. */
async function accountOf(url: string): Promise<string> {
  const address = new URL(url)
  address.pathname = '/'
  const connection = await createConnection({ uri: address.href, ...connectionOptions })
  try {
    return await currentAccount(connection)
  } finally {
    connection.destroy()
  }
}

async function currentAccount(connection: Connection): Promise<string> {
  const [rows] = await connection.query<RowDataPacket[]>('select current_user() as account')
  return String(rows[0]?.account)
}
