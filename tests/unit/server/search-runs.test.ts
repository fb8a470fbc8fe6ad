import { describe, expect, it } from 'vitest'
import { sentenceOf } from '../../../server/services/search-runs'
import { Refusal } from '../../../server/utils/problem'

describe('a search that cannot go on', () => {
  it('fails with the sentence of what refused its row', () => expect(sentenceOf(new Refusal(422, 'A study has at most 20,000 rows.'))).toBe('A study has at most 20,000 rows.'))
  it('is tried again after any other error', () => expect(sentenceOf(new Error('connect ECONNREFUSED'))).toBeNull())
})
