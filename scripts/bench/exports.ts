import { readFileSync, writeFileSync } from 'node:fs'
import type { Context, Measure, Row } from './measure'
import { newStudy, signedIn } from './support/signed-in'
import type { Call } from './support/signed-in'

const kinds = ['xlsx', 'csv', 'json'] as const
const megabyte = 1e6

/** One of a process's figures of memory, in bytes: VmRSS as it is, VmHWM its peak since the last reset. */
function memoryOf(pid: number, figure: 'VmRSS' | 'VmHWM'): number {
  const found = new RegExp(`^${figure}:\\s+(\\d+) kB$`, 'm').exec(readFileSync(`/proc/${pid}/status`, 'utf8'))
  return Number(found?.[1]) * 1024
}

/** Has the peak of a process's memory begin anew. */
const resetPeak = (pid: number) => writeFileSync(`/proc/${pid}/clear_refs`, '5')

/** 10,000 rows of ten different constellations, computed. */
async function tenThousand(call: Call): Promise<string> {
  const study = await newStudy(call, 'Ten thousand rows to export')
  for (let page = 0; page < 5; page++) {
    const items = Array.from({ length: 2000 }, (_, i) => ({
      name: `candidate ${page * 2000 + i}`, family: 'psk', order: 4 + i % 10, note: `Row ${i} of page ${page}`,
    }))
    await call('POST', `/api/studies/${study}/candidates`, { items })
  }
  for (;;) {
    const { items } = await call<{ items: { id: string, computing: number, candidates: number }[] }>('GET', '/api/studies')
    const own = items.find(({ id }) => id === study)
    if (own?.candidates === 10_000 && own.computing === 0) return study
    await new Promise(resolve => setTimeout(resolve, 100))
  }
}

/** Reads an answer to its end without keeping it. @returns its length in bytes */
async function lengthOf(stream: ReadableStream<Uint8Array>): Promise<number> {
  const reader = stream.getReader()
  let length = 0
  for (let part = await reader.read(); !part.done; part = await reader.read()) length += part.value.length
  return length
}

async function exportOnce(context: Context, call: Call, study: string, kind: typeof kinds[number]): Promise<Row[]> {
  const before = memoryOf(context.serverPid, 'VmRSS')
  resetPeak(context.serverPid)
  const began = performance.now()
  const length = await lengthOf(await call<ReadableStream<Uint8Array>>('GET', `/api/studies/${study}/export.${kind}`))
  const seconds = (performance.now() - began) / 1000
  const growth = memoryOf(context.serverPid, 'VmHWM') - before
  const what = `export of 10,000 rows as ${kind.toUpperCase()} (${(length / megabyte).toFixed(1)} MB)`
  return [
    { what: `${what}: from the request to its last byte`, figure: seconds, unit: 's', target: null },
    { what: `${what}: growth of the server's memory at its peak`, figure: growth / megabyte, unit: 'MB', target: 200 },
  ]
}

export default {
  title: 'exports of 10,000 rows',
  needs: 'server',
  run: async (context) => {
    const call = await signedIn(context)
    const study = await tenThousand(call)
    const rows: Row[] = []
    for (const kind of kinds) rows.push(...await exportOnce(context, call, study, kind))
    return rows
  },
} satisfies Measure
