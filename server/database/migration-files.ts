/** One generated migration: its tag and its statements in order. */
export interface Migration {
  tag: string
  statements: string[]
}

interface Journal { entries: { idx: number, tag: string }[] }

/**
 * Reads the generated migrations in their order.
 * @param read text of a file under drizzle/
 */
export async function readMigrations(read: (path: string) => Promise<string>): Promise<Migration[]> {
  const journal: Journal = JSON.parse(await read('meta/_journal.json'))
  const entries = [...journal.entries].sort((a, b) => a.idx - b.idx)
  return Promise.all(entries.map(async ({ tag }) => {
    const text = await read(`${tag}.sql`)
    return { tag, statements: text.split('--> statement-breakpoint').map(part => part.trim()).filter(part => part !== '') }
  }))
}
