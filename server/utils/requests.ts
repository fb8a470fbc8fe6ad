import type { ServerResponse } from 'node:http'

let running = 0
let whenIdle = () => {}

/** Counts a request until its answer is complete or its caller gone. */
export function countRequest(response: ServerResponse): void {
  running++
  response.once('close', () => {
    running--
    if (running === 0) whenIdle()
  })
}

/** Resolves when no request is being answered. */
export const requestsAnswered = (): Promise<void> => running === 0 ? Promise.resolve() : new Promise(resolve => (whenIdle = resolve))
