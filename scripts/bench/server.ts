import type { Candidate } from '#shared/schemas/candidates'
import type { StudyEvent } from '#shared/schemas/events'
import type { Measure, Row } from './measure'
import { newStudy, signedIn } from './support/signed-in'
import type { Call } from './support/signed-in'

/** Calls back for each message of a study's events. */
async function listen(call: Call, study: string, receive: (event: StudyEvent) => void): Promise<() => Promise<void>> {
  const reader = (await call<ReadableStream<Uint8Array>>('GET', `/api/studies/${study}/events`)).getReader()
  const read = async () => {
    const decoder = new TextDecoder()
    let text = ''
    for (let part = await reader.read(); !part.done; part = await reader.read()) {
      const messages = (text + decoder.decode(part.value, { stream: true })).split('\n\n')
      text = messages.pop()!
      for (const message of messages) {
        const data = message.split('\n').find(line => line.startsWith('data: '))
        if (data) receive(JSON.parse(data.slice('data: '.length)) as StudyEvent)
      }
    }
  }
  void read()
  return () => reader.cancel()
}

const seconds = (since: number) => (performance.now() - since) / 1000

/** 772 rows of PAM, PSK, QAM and hexagonal sets, M from 2 to 256, and 228 of APSK: no two with the same points. */
const sweeps = [
  { base: {}, axes: [{ field: 'family', values: ['pam', 'psk', 'qam', 'hexagonal'] }, { field: 'order', start: 2, stop: 256, step: 1 }] },
  { base: { family: 'apsk', rings: [4, 12] }, axes: [{ field: 'ratios.0', start: 2, stop: 4.27, step: 0.01 }] },
]

async function sweepTime(call: Call): Promise<Row> {
  const study = await newStudy(call, 'A thousand rows')
  const done = new Set<string>()
  let finish = () => {}
  const finished = new Promise<void>((resolve) => {
    finish = resolve
  })
  const stop = await listen(call, study, ({ sweep }) => {
    if (sweep?.state === 'done') done.add(sweep.id)
    if (done.size === sweeps.length) finish()
  })
  const began = performance.now()
  for (const sweep of sweeps) await call('POST', `/api/studies/${study}/sweeps`, sweep)
  await finished
  const figure = seconds(began)
  await stop()
  return { what: 'sweep of 1,000 rows, 41 SNR values each: from the request until all are stored', figure, unit: 's', target: 6 }
}

async function editTimes(call: Call): Promise<Row[]> {
  const study = await newStudy(call, 'Edits')
  let row = await call<Candidate>('POST', `/api/studies/${study}/candidates`, { family: 'psk', order: 2, implementationLossDb: 0.37 })
  let seen: (row: Candidate) => void = () => {}
  const stop = await listen(call, study, ({ rows }) => rows?.forEach(changed => seen(changed)))
  const times: number[] = []
  for (let order = 3; order <= 256; order += 6) {
    const computed = new Promise<void>((resolve) => {
      seen = (changed) => {
        if (changed.inputs.order === order && changed.state === 'computed') resolve()
      }
    })
    const began = performance.now()
    row = await call<Candidate>('PATCH', `/api/candidates/${row.id}`, { order }, { 'if-match': `"${row.version}"` })
    await computed
    times.push(seconds(began) * 1000)
  }
  await stop()
  times.sort((a, b) => a - b)
  const at = (part: number) => times[Math.floor(part * (times.length - 1))]!
  return [
    { what: 'one edit, M up to 256: from the request to the event with its numbers, median', figure: at(0.5), unit: 'ms', target: 120 },
    { what: 'one edit, M up to 256: 95 %', figure: at(0.95), unit: 'ms', target: 250 },
  ]
}

async function pageTime(call: Call): Promise<Row> {
  const study = await newStudy(call, 'Ten thousand rows')
  for (let i = 0; i < 5; i++) await call('POST', `/api/studies/${study}/candidates`, { items: Array.from({ length: 2000 }, () => ({})) })
  const times: number[] = []
  for (let next: string | null = ''; next !== null;) {
    const began = performance.now()
    const page: { next: string | null } = await call('GET', `/api/studies/${study}/candidates?limit=2000${next ? `&cursor=${next}` : ''}`)
    next = page.next
    times.push(seconds(began) * 1000)
  }
  return { what: 'a page of 2,000 rows out of 10,000: the slowest', figure: Math.max(...times), unit: 'ms', target: 400 }
}

export default {
  title: 'sweep, edits and pages through the API',
  needs: 'server',
  run: async (context) => {
    const call = await signedIn(context)
    return [...await editTimes(call), await sweepTime(call), await pageTime(call)]
  },
} satisfies Measure
