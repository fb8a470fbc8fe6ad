import { beforeAll, describe, expect, it } from 'vitest'
import { anonymous, signIn } from '../support/client'
import type { Client } from '../support/client'
import { ownStudy } from './own-study'

let owner: Client
let study: string
beforeAll(async () => {
  owner = await signIn('owner')
  study = await ownStudy(owner, 'Headers only')
})

/** Status, media type and length of body of an answer to HEAD, or an error when it has not ended within ten seconds. */
async function head(path: string, client = owner) {
  const response = await client.fetch(path, { method: 'HEAD', signal: AbortSignal.timeout(10_000) })
  return [response.status, response.headers.get('content-type'), (await response.text()).length]
}

describe('HEAD', () => {
  it('of a study\'s events is answered at once, without a stream', async () => {
    expect(await head(`/api/studies/${study}/events`)).toEqual([200, 'text/event-stream; charset=utf-8', 0])
  })
  it.each([
    ['xlsx', 'application/vnd.openxmlformats-officedocument.spreadsheetml.sheet'], ['csv', 'text/csv; charset=utf-8'], ['json', 'application/json'],
  ])('of an export as %s has the headers of the file', async (extension, type) => {
    expect(await head(`/api/studies/${study}/export.${extension}`)).toEqual([200, type, 0])
  })
  it('of a list has the headers of GET', async () => expect(await head('/api/studies')).toEqual([200, 'application/json', 0]))
  it('of a page has the headers of GET', async () => expect(await head('/sign-in', anonymous())).toEqual([200, 'text/html;charset=utf-8', 0]))
  it('is refused to whom GET is refused', async () => expect((await head(`/api/studies/${study}/events`, anonymous()))[0]).toBe(401))
  it('is 405 where there is no GET', async () => expect((await head('/api/evaluate'))[0]).toBe(405))
  it('leaves no stream open: an account may ask more than fifty times', async () => {
    const answers = await Promise.all(Array.from({ length: 60 }, () => head(`/api/studies/${study}/events`)))
    expect(answers.filter(([status]) => status !== 200)).toEqual([])
  })
})
