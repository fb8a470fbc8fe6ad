import { spawn } from 'node:child_process'
import { once } from 'node:events'
import { mkdtemp, readFile, rm } from 'node:fs/promises'
import { join } from 'node:path'
import { build } from 'esbuild'
import type { RowDataPacket } from 'mysql2/promise'
import { afterAll, beforeAll, describe, expect, inject, it } from 'vitest'
import { inRoot } from '../../scripts/lib/places.mjs'
import { testFolder } from '../../scripts/lib/stack.mjs'
import { closeDatabase, useDatabase } from '../../server/database/client'
import { migrate } from '../../server/database/migrate'
import { readMigrations } from '../../server/database/migration-files'
import type { Migration } from '../../server/database/migration-files'
import { studies } from '../../server/database/schema'
import { databaseConnection } from './database-of-test'

const admin = databaseConnection('administrator')
const application = databaseConnection()
const folder = inRoot('drizzle')
let migrations: Migration[]
let steps: number
const made: string[] = []

beforeAll(async () => {
  migrations = await readMigrations(path => readFile(join(folder, path), 'utf8'))
  steps = migrations.reduce((sum, { statements }) => sum + statements.length, 0)
})
afterAll(async () => {
  for (const name of made) await admin().query('drop database ??', [name])
})

/** An empty database, as Latin-1 as an old server makes it. */
async function emptyDatabase(name: string): Promise<string> {
  await admin().query('create database ?? character set latin1', [name])
  made.push(name)
  const url = new URL(inject('databaseAdminUrl'))
  url.pathname = `/${name}`
  return url.href
}

const run = (url: string, afterStep?: (tag: string, step: number) => void) => migrate({ adminUrl: url, url, migrations, afterStep })

/** Columns, keys and indexes of a database, to compare two of them. */
async function shapeOf(name: string): Promise<unknown> {
  const queries = [
    'select table_name, column_name, column_type, is_nullable, collation_name from information_schema.columns where table_schema = ? order by 1, 2',
    'select table_name, index_name, column_name, seq_in_index from information_schema.statistics where table_schema = ? order by 1, 2, 4',
    'select table_name, constraint_name, delete_rule from information_schema.referential_constraints where constraint_schema = ? order by 1, 2',
  ]
  return Promise.all(queries.map(async query => (await admin().query(query, [name]))[0]))
}

describe('migrating', () => {
  it('carries out every step on an empty database', async () => expect(await run(await emptyDatabase('hp_empty'))).toBe(steps))
  it('does nothing the second time', async () => {
    const url = await emptyDatabase('hp_twice')
    await run(url)
    expect(await run(url)).toBe(0)
  })
  it('carries out each step once when several do it at the same time', async () => {
    const url = await emptyDatabase('hp_at_once')
    const counts = await Promise.all([run(url), run(url), run(url)])
    expect(counts.toSorted((a, b) => a - b)).toEqual([0, 0, steps])
  })
  it('makes tables of whole Unicode whatever the database\'s default was', async () => {
    await run(await emptyDatabase('hp_unicode'))
    const [rows] = await admin().query<RowDataPacket[]>('select distinct character_set_name as name from information_schema.columns where table_schema = ? and character_set_name is not null', ['hp_unicode'])
    expect(rows.map(row => row.name)).toEqual(['utf8mb4'])
  })
  it('goes on after each step that was carried out and not recorded', async () => {
    const url = await emptyDatabase('hp_interrupted')
    let interruptions = 0
    for (let done = false; !done;) {
      try {
        await run(url, () => {
          throw new Error('interrupted')
        })
        done = true
      } catch (error) {
        if (!(error instanceof Error && error.message === 'interrupted')) throw error
        // What a kill leaves: done, and not recorded. The next run must see it and go one further.
        await carryOn(url)
        interruptions++
      }
    }
    await run(await emptyDatabase('hp_undisturbed'))
    expect([interruptions > 10, await shapeOf('hp_interrupted')]).toEqual([true, await shapeOf('hp_undisturbed')])
  })
  it('goes on after a process that was killed in the middle', async () => {
    const url = await emptyDatabase('hp_killed')
    const place = await mkdtemp(join(testFolder, 'migrate-'))
    const program = join(place, 'migrate-until-killed.mjs')
    await build({ entryPoints: [inRoot('tests/api/migrate-until-killed.ts')], outfile: program, bundle: true, platform: 'node', format: 'esm', packages: 'external', logLevel: 'silent' })
    const [, signal] = await once(spawn(process.execPath, [program, url, folder, '7'], { cwd: testFolder }), 'close')
    const rest = await run(url)
    await rm(place, { recursive: true })
    expect([signal, rest]).toEqual(['SIGKILL', steps - 7])
  })
  it('does not take a table for its own that was there before', async () => {
    const url = await emptyDatabase('hp_foreign')
    await admin().query('create table hp_foreign.activity (id int)')
    await expect(run(url)).rejects.toThrow('Table \'activity\' already exists')
  })
  it('says which address names no database', async () => {
    const url = new URL(inject('databaseAdminUrl'))
    url.pathname = '/'
    await expect(run(url.href)).rejects.toThrow('The database\'s address names no database')
  })
})

/** Records one interrupted step, by a run that repeats it and is interrupted at the next one. */
async function carryOn(url: string) {
  let count = 0
  await run(url, () => {
    if (++count === 2) throw new Error('interrupted')
  }).catch((error: Error) => {
    if (error.message !== 'interrupted') throw error
  })
}

describe('the application\'s account', () => {
  const refusal = (statement: string) => application().query(statement).then(() => 'done', (error: { code: string }) => error.code)
  it('cannot change activity', async () => expect(await refusal('update activity set action = \'nothing\'')).toBe('ER_TABLEACCESS_DENIED_ERROR'))
  it('cannot delete activity', async () => expect(await refusal('delete from activity')).toBe('ER_TABLEACCESS_DENIED_ERROR'))
  it('cannot change the schema', async () => expect(await refusal('create table extra (id int)')).toBe('ER_TABLEACCESS_DENIED_ERROR'))
  it('changes what the application changes', async () => expect(await refusal('update studies set version = version where 1 = 0')).toBe('done'))
})

describe('the database client', () => {
  beforeAll(() => {
    process.env.DATABASE_URL = inject('databaseUrl')
  })
  afterAll(async () => {
    delete process.env.DATABASE_URL
    await closeDatabase()
  })
  it('reads JSON columns as what was written', async () => {
    const [study] = await useDatabase().select({ requirements: studies.requirements }).from(studies).limit(1)
    expect(study!.requirements.target).toEqual({ quantity: 'ser', value: 1e-6, stage: 'afterDecoding' })
  })
  it('keeps milliseconds and reads times as UTC', async () => {
    const [[row], [now]] = await Promise.all([
      useDatabase().select({ createdAt: studies.createdAt }).from(studies).limit(1),
      admin().query<RowDataPacket[]>('select unix_timestamp(created_at) * 1000 as ms from studies limit 1').then(([rows]) => rows),
    ])
    expect(Math.abs(row!.createdAt.getTime() - Number(now!.ms))).toBeLessThan(1)
  })
})
