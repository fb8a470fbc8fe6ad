import { createHash, randomBytes } from 'node:crypto'
import { and, desc, eq, gt, isNull, lt, or, sql } from 'drizzle-orm'
import type { z } from 'zod'
import type { Account, CreatedToken, Token, tokenCreation } from '#shared/schemas/session'
import { useDatabase } from '../database/client'
import type { Transaction } from '../database/client'
import { tokens, users } from '../database/schema'
import type { Caller } from '../utils/caller'
import { closeStreams } from '../utils/event-stream'
import { newId } from '../utils/ids'
import { problem } from '../utils/problem'
import { recordActivity } from './activity'
import { accountColumns } from './sessions'
import { transact } from './transactions'

/** Most tokens of an account. */
const mostTokens = 50
const prefix = 'hp_'
const hashOf = (token: string) => createHash('sha256').update(token).digest('hex')

/** What holds of a token that still works. */
const works = () => and(gt(tokens.expiresAt, new Date()), isNull(users.disabledAt))

/** Who calls by an API token; null when it is unknown, expired, or its account disabled. */
export async function tokenCaller(token: string): Promise<Caller | null> {
  if (!token.startsWith(prefix)) return null
  const db = useDatabase()
  const [row] = await db.select({ account: accountColumns, id: tokens.id, scope: tokens.scope }).from(tokens)
    .innerJoin(users, eq(users.id, tokens.userId))
    .where(and(eq(tokens.hash, hashOf(token)), works()))
  if (!row) return null
  // Once a minute is enough to see whether a token is in use.
  await db.update(tokens).set({ lastUsedAt: sql`current_timestamp(3)` })
    .where(and(eq(tokens.id, row.id), or(isNull(tokens.lastUsedAt), lt(tokens.lastUsedAt, sql`current_timestamp(3) - interval 1 minute`))))
  return { account: row.account, scope: row.scope, sessionId: null, tokenId: row.id }
}

/** The account of a token that has neither been revoked nor expired and whose account is not disabled. */
export async function tokenAccount(id: string): Promise<Account | null> {
  const [row] = await useDatabase().select({ account: accountColumns }).from(tokens)
    .innerJoin(users, eq(users.id, tokens.userId)).where(and(eq(tokens.id, id), works()))
  return row?.account ?? null
}

const shown = (row: typeof tokens.$inferSelect): Token => ({
  id: row.id, name: row.name, scope: row.scope,
  createdAt: row.createdAt.toISOString(), expiresAt: row.expiresAt.toISOString(), lastUsedAt: row.lastUsedAt?.toISOString() ?? null,
})

/** An account's tokens, the newest first. */
export async function listTokens(account: Account): Promise<Token[]> {
  const rows = await useDatabase().select().from(tokens).where(eq(tokens.userId, account.id)).orderBy(desc(tokens.id))
  return rows.map(shown)
}

/** Makes a token; its text is in this answer and nowhere else. */
export async function createToken(account: Account, { name, scope, days }: z.infer<typeof tokenCreation>): Promise<CreatedToken> {
  const secret = prefix + randomBytes(32).toString('base64url')
  const id = newId()
  return transact(async (tx) => {
    // The account's row is the lock under which its tokens are counted.
    await tx.select({ id: users.id }).from(users).where(eq(users.id, account.id)).for('update')
    const count = await tx.$count(tokens, eq(tokens.userId, account.id))
    if (count >= mostTokens) problem(422, `An account has at most ${mostTokens} tokens; revoke one first.`)
    await tx.insert(tokens).values({
      id, userId: account.id, name, scope, hash: hashOf(secret), expiresAt: new Date(Date.now() + days * 24 * 60 * 60 * 1000),
    })
    await recordActivity(tx, { by: account, action: 'created token', subject: name })
    const [row] = await tx.select().from(tokens).where(eq(tokens.id, id))
    return { ...shown(row!), secret }
  })
}

/**
 * Revokes a token at once, and ends its account's open streams; pages of its sessions connect again.
 * @throws 404 when the account has no such token
 */
export async function revokeToken(account: Account, id: string): Promise<void> {
  await transact(async (tx) => {
    const [row] = await tx.select({ name: tokens.name }).from(tokens).where(and(eq(tokens.id, id), eq(tokens.userId, account.id)))
    if (!row) problem(404, 'You have no such token.')
    await tx.delete(tokens).where(eq(tokens.id, id))
    await recordActivity(tx, { by: account, action: 'revoked token', subject: row.name })
  })
  closeStreams(account.id)
}

/** Revokes all of an account's tokens within a transaction; close its streams after the commit. */
export async function revokeTokens(tx: Transaction, account: Account): Promise<void> {
  const rows = await tx.select({ name: tokens.name }).from(tokens).where(eq(tokens.userId, account.id))
  await tx.delete(tokens).where(eq(tokens.userId, account.id))
  for (const { name } of rows) await recordActivity(tx, { by: account, action: 'revoked token', subject: name })
}
