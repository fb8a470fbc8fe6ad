import { z } from 'zod'
import { id, name, pageQuery } from './common'
import { accountRole, email, newPassword } from './session'

/** An account as administrators see it; items of GET /api/people. */
export const person = z.object({
  id, email: z.string(), name: z.string(), role: accountRole,
  disabledAt: z.string().nullable(), createdAt: z.string(),
})
export type Person = z.infer<typeof person>

/** POST /api/people */
export const personCreation = z.strictObject({ email, name: name('the person\'s name'), role: accountRole, password: newPassword })

/** PATCH /api/people/{person}; a new password ends the person's sessions. A successor is named with `disabled: true`. */
export const personChange = z.strictObject({
  name: name('the person\'s name').optional(),
  role: accountRole.optional(),
  disabled: z.boolean({ error: 'Disabled is true or false.' }).optional(),
  password: newPassword.optional(),
  /** account to which the studies pass that would be left without an owner who may sign in */
  successor: id.optional(),
})

/** Query of GET /api/people; the cursor is the last account's id. */
export const peopleQuery = pageQuery.extend({ cursor: id.optional() })
