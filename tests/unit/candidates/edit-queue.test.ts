import { describe, expect, it } from 'vitest'
import { EditQueue } from '~/utils/candidates/edit-queue'

describe('edits of one row', () => {
  it('run one after the other', async () => {
    const queue = new EditQueue()
    const log: string[] = []
    let release: () => void = () => {}
    const first = queue.run('a', () => new Promise<void>((resolve) => {
      log.push('first begins')
      release = () => {
        log.push('first ends')
        resolve()
      }
    }))
    const second = queue.run('a', async () => {
      log.push('second')
    })
    await Promise.resolve()
    release()
    await Promise.all([first, second])
    expect(log).toEqual(['first begins', 'first ends', 'second'])
  })
  it('do not wait for another row\'s', async () => {
    const queue = new EditQueue()
    void queue.run('a', () => new Promise<void>(() => {}))
    let ran = false
    await queue.run('b', async () => {
      ran = true
    })
    expect(ran).toBe(true)
  })
  it('go on after one that fails', async () => {
    const queue = new EditQueue()
    const failing = queue.run('a', () => Promise.reject(new Error('lost')))
    let ran = false
    const following = queue.run('a', async () => {
      ran = true
    })
    await expect(failing).rejects.toThrow('lost')
    await following
    expect(ran).toBe(true)
  })
})
