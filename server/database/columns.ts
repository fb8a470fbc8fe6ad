import { sql } from 'drizzle-orm'
import { customType, varchar } from 'drizzle-orm/mysql-core'

/** Identifier made by the application: a UUID, version 7. */
export const uuid = (column: string) => varchar(column, { length: 36 })

/** UTC time with milliseconds. */
export const instant = customType<{ data: Date, driverData: Date | string }>({
  dataType: () => 'datetime(3)',
  toDriver: value => value.toISOString().slice(0, -1).replace('T', ' '),
  // The connection's time zone is UTC; the driver hands dates over as text.
  fromDriver: value => value instanceof Date ? value : new Date(`${value.replace(' ', 'T')}Z`),
})

/** Now, with milliseconds, in the connection's time zone, which is UTC. */
export const now = sql`current_timestamp(3)`

/** JSON whose older rows are completed when they are read: the one place that knows what they lack. */
export const completedJson = <T>(column: string, complete: (stored: T) => T) => customType<{ data: T, driverData: string | T }>({
  dataType: () => 'json',
  toDriver: value => JSON.stringify(value),
  // The driver hands a JSON column over parsed, a JSON expression as text.
  fromDriver: value => complete(typeof value === 'string' ? JSON.parse(value) as T : value),
})(column)
