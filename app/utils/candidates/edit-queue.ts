/**
 * Runs tasks of one row one after the other, and rows beside each other:
 * each edit then carries the version that the edit before it left.
 */
export class EditQueue {
  private readonly tails = new Map<string, Promise<void>>()

  /** @returns when the task has run; what it throws is the caller's, and does not hold up the next task */
  run(row: string, task: () => Promise<void>): Promise<void> {
    const done = (this.tails.get(row) ?? Promise.resolve()).then(task)
    const tail = done.catch(() => undefined).finally(() => {
      if (this.tails.get(row) === tail) this.tails.delete(row)
    })
    this.tails.set(row, tail)
    return done
  }

  get idle(): boolean {
    return this.tails.size === 0
  }
}
