import { z } from 'zod'
import { listOf } from '#shared/schemas/common'
import { peopleQuery, person, personChange, personCreation } from '#shared/schemas/people'
import { account, createdToken, passwordChange, signIn, token, tokenCreation } from '#shared/schemas/session'
import { tagged } from './operation'

const tooMany = 'Too many attempts for this account or from this address; Retry-After says when to try again.'

export const sessionOperations = tagged('Session', {
  'POST /api/session': {
    summary: 'Signs in and sets the session cookie. 10 failed attempts an account and 30 an address within 15 minutes.',
    body: signIn, answer: account, refusals: { 401: 'The e-mail address or the password is wrong.', 429: tooMany },
  },
  'GET /api/session': { summary: 'Tells who is signed in.', answer: account },
  'DELETE /api/session': { summary: 'Signs out; the session ends at once.', status: 204 },
  'GET /api/_auth/session': { summary: 'The session as pages read it; without `user` when nobody is signed in.', answer: z.object({ id: z.string(), user: account.optional() }) },
  'DELETE /api/_auth/session': { summary: 'Signs out; the session ends at once.', answer: z.object({ loggedOut: z.literal(true) }) },
})

export const accountOperations = tagged('Account', {
  'POST /api/account/password': {
    summary: 'Changes the caller\'s password and ends their other sessions; API tokens go on working unless endTokens says otherwise.', body: passwordChange, status: 204, refusals: { 429: tooMany },
  },
  'GET /api/account/tokens': { summary: 'The caller\'s API tokens, without their text.', answer: listOf(token) },
  'POST /api/account/tokens': { summary: 'Makes an API token, whose text this answer shows once. At most 50 an account.', body: tokenCreation, status: 201, answer: createdToken },
  'DELETE /api/account/tokens/:token': { summary: 'Revokes a token at once.', status: 204 },
})

export const peopleOperations = tagged('People', {
  'GET /api/people': { summary: 'All accounts.', query: peopleQuery, answer: listOf(person) },
  'POST /api/people': { summary: 'Creates an account with a password.', body: personCreation, status: 201, answer: person },
  'PATCH /api/people/:person': {
    summary: 'Renames, disables, gives a role or a new password. Disabling and a new password end the sessions at once; an administrator always remains, and studies that would be left without an owner pass to a successor.',
    body: personChange, answer: person,
    refusals: { 422: 'An input is not allowed; or no administrator would remain; or `successor` is missing, and the answer names the studies.' },
  },
})
