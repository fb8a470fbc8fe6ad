import { availableParallelism } from 'node:os'
import { Piscina } from 'piscina'
import type { Task, TaskKind, Tasks } from './tasks'
import worker from './worker?thread'

/** Interactive: a row that somebody waits for. Evaluation: one of POST /api/evaluate, seconds at worst. Bulk: sweeps and changes of a whole study. */
export type Priority = 'interactive' | 'evaluation' | 'bulk'

export interface ComputeOptions {
  priority: Priority
  /** aborts the task: one that waits is dropped, one that runs is stopped with its worker */
  signal?: AbortSignal
  /** how often a task is tried whose worker breaks down; default 2 */
  attempts?: number
}

/** A task whose workers broke down as often as it was tried. */
export class ComputationFailed extends Error {
  constructor(cause: unknown) {
    super('The computation broke down twice. Change the row, or ask the administrator to look at the server\'s log.', { cause })
    this.name = 'ComputationFailed'
  }
}

interface Job {
  task: { kind: TaskKind, asked: unknown }
  options: ComputeOptions
  left: number
  resolve: (answer: unknown) => void
  reject: (error: unknown) => void
}

const threads = Math.min(8, Math.max(2, availableParallelism()))
const waiting: Record<Priority, Job[]> = { interactive: [], evaluation: [], bulk: [] }
const running: Record<Priority, number> = { interactive: 0, evaluation: 0, bulk: 0 }
/** While somebody works, and this long after (milliseconds), bulk work leaves one worker free for them. */
const attention = 5000
let lastInteractive = -Infinity
let pool: Piscina | undefined

/** Made when it is first needed: while modules load, the built server does not yet know where its worker is. */
function usePool(): Piscina {
  pool ??= new Piscina({
    filename: worker(), minThreads: 1, maxThreads: threads, idleTimeout: Infinity, concurrentTasksPerWorker: 1,
    resourceLimits: { maxOldGenerationSizeMb: 1024 },
  })
  return pool
}

function next(): Job | undefined {
  if (running.interactive + running.evaluation + running.bulk >= threads) return undefined
  const bulkThreads = performance.now() - lastInteractive < attention ? threads - 1 : threads
  // One worker never evaluates: a row of the grid waits for a batch of bulk work at most, however many evaluations were asked for.
  return waiting.interactive.shift()
    ?? (running.evaluation < threads - 1 ? waiting.evaluation.shift() : undefined)
    ?? (running.bulk < bulkThreads ? waiting.bulk.shift() : undefined)
}

function pump() {
  for (let job = next(); job; job = next()) void run(job)
}

async function run(job: Job) {
  const { task, options: { priority, signal } } = job
  running[priority]++
  try {
    job.resolve(await usePool().run(task, { signal }))
  } catch (error) {
    job.left--
    if (signal?.aborted) job.reject(signal.reason)
    else if (job.left > 0) waiting[priority].unshift(job)
    else job.reject(new ComputationFailed(error))
  } finally {
    running[priority]--
    pump()
  }
}

/**
 * Computes a task in a worker thread; interactive tasks go before evaluations, those before bulk ones. The only way to the workers: a queue
 * shared with other machines can take its place here.
 * @throws the signal's reason when the caller goes away
 * @throws ComputationFailed when the worker breaks down at every attempt (a new worker takes its place)
 */
export function compute<K extends TaskKind>(task: Task<K>, options: ComputeOptions): Promise<Tasks[K]['answer']> {
  const { signal, priority, attempts = 2 } = options
  return new Promise((resolve, reject) => {
    if (signal?.aborted) return reject(signal.reason)
    const job: Job = { task, options, left: attempts, resolve: answer => resolve(answer as Tasks[K]['answer']), reject }
    waiting[priority].push(job)
    if (priority === 'interactive') lastInteractive = performance.now()
    signal?.addEventListener('abort', () => {
      const place = waiting[priority].indexOf(job)
      if (place < 0) return
      waiting[priority].splice(place, 1)
      reject(signal.reason)
    }, { once: true })
    pump()
  })
}

/** Ends the workers; tasks that run are given up. */
export async function closePool(): Promise<void> {
  const closing = pool
  pool = undefined
  await closing?.destroy()
}
