import { z } from 'zod'
import { id } from './common'

export const accountRoles = ['admin', 'member'] as const
export const accountRole = z.enum(accountRoles, { error: 'A role is admin or member.' })
export type AccountRole = z.infer<typeof accountRole>

export const email = z.string({ error: 'Enter an e-mail address.' }).trim().toLowerCase()
  .max(254, 'An e-mail address has at most 254 characters.')
  .pipe(z.email({ error: 'Enter an e-mail address such as name@example.org.' }))

export const newPassword = z.string({ error: 'Enter a password.' })
  .min(12, 'A password has at least 12 characters.')
  .max(200, 'A password has at most 200 characters.')

/** POST /api/session */
export const signIn = z.strictObject({
  email,
  password: z.string({ error: 'Enter your password.' }).min(1, 'Enter your password.').max(200, 'A password has at most 200 characters.'),
})

/** Who is signed in. */
export const account = z.object({ id, email: z.string(), name: z.string(), role: accountRole })
export type Account = z.infer<typeof account>

/** POST /api/account/password */
export const passwordChange = z.strictObject({
  current: z.string({ error: 'Enter your present password.' }).min(1, 'Enter your present password.').max(200, 'A password has at most 200 characters.'),
  password: newPassword,
  /** whether the account's API tokens end as well; sessions always do */
  endTokens: z.boolean({ error: 'Whether tokens end is true or false.' }).default(false),
})

/** POST /api/account/tokens */
export const tokenCreation = z.strictObject({
  name: z.string({ error: 'Name the token.' }).trim().min(1, 'Name the token.').max(80, 'A token\'s name has at most 80 characters.'),
  scope: z.enum(['read', 'write'], { error: 'The scope is read or write.' }),
  days: z.number({ error: 'A token lives for 1 to 365 days.' }).int('A token lives for 1 to 365 days.')
    .min(1, 'A token lives for 1 to 365 days.').max(365, 'A token lives for 1 to 365 days.'),
})
export const token = z.object({
  id, name: z.string(), scope: z.enum(['read', 'write']),
  createdAt: z.string(), expiresAt: z.string(), lastUsedAt: z.string().nullable(),
})
export type Token = z.infer<typeof token>

/** Answer of POST /api/account/tokens: the token's text is shown this once. */
export const createdToken = token.extend({ secret: z.string() })
export type CreatedToken = z.infer<typeof createdToken>
