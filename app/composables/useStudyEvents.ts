import type { StudyEvent } from '#shared/schemas/events'

/** connecting: the first try; open: events arrive; lost: trying again. */
export type EventsState = 'connecting' | 'open' | 'lost'
/** `last`: id of the last event that the page which holds the stream has received */
type Shared = { kind: 'message', data: string, last: string } | { kind: 'state', state: EventsState, last: string } | { kind: 'askState' }
type Handlers = {
  onEvent: (event: StudyEvent) => void
  /** the page has begun: show something at once */
  onStart: () => void
  /** read everything: once events arrive or seem to be late, and again when something may have changed that no event will tell */
  onReload: () => void
}

const firstWaitMs = 1000
const longestWaitMs = 15_000
/** How long a page waits for the one that holds the stream to answer before it connects itself, and for events before it reads all rows without. */
const patienceMs = 1500
/** How often a page asks whether the one that holds the stream still does: the browser may have put it to sleep. */
const askEveryMs = 10_000

/**
 * Events of one study. One page of a browser holds the stream and passes its messages on to the others
 * (HTTP/1.1 allows six connections to a server); when that page goes, the next one in the line of the lock takes over
 * from the last event that it was passed.
 */
export function useStudyEvents(studyId: string, { onEvent, onStart, onReload }: Handlers) {
  const state = ref<EventsState>('connecting')
  const name = `halfplane-study-${studyId}`
  let channel: BroadcastChannel | null = null
  let source: EventSource | null = null
  let leading = false
  /** what was read may be older than the first event to come */
  let gap = true
  let begun = false
  let last = ''
  let waitMs = firstWaitMs
  let retry: ReturnType<typeof setTimeout> | undefined
  let patience: ReturnType<typeof setTimeout> | undefined
  let late: ReturnType<typeof setTimeout> | undefined
  let asking: ReturnType<typeof setInterval> | undefined
  const ending = new AbortController()

  const share = (message: Shared) => channel?.postMessage(message)

  const read = () => {
    begun = true
    clearTimeout(late)
    onReload()
  }

  const setState = (next: EventsState) => {
    state.value = next
    if (leading) share({ kind: 'state', state: next, last })
  }

  const take = (data: string, id: string) => {
    const event = JSON.parse(data) as StudyEvent
    last = id
    if (event.reload || gap || !begun) read()
    gap = false
    onEvent(event)
  }

  const connect = () => {
    clearTimeout(retry)
    source?.close()
    const after = last && !gap ? `?after=${last}` : ''
    source = new EventSource(`/api/studies/${studyId}/events${after}`)
    source.onopen = () => {
      waitMs = firstWaitMs
      if (!gap) setState('open')
    }
    // The first message of a stream that names no event says that it has joined: what is read from then on misses nothing.
    source.onmessage = ({ data, lastEventId }: MessageEvent<string>) => {
      if (leading) share({ kind: 'message', data, last: lastEventId || last })
      take(data, lastEventId || last)
      if (state.value !== 'open') setState('open')
    }
    source.onerror = () => {
      setState('lost')
      // The browser tries again by itself after a dropped connection, but not after an answer such as 503.
      if (source?.readyState !== EventSource.CLOSED) return
      retry = setTimeout(connect, waitMs)
      waitMs = Math.min(2 * waitMs, longestWaitMs)
    }
  }

  const lead = () => new Promise<void>((resolve) => {
    leading = true
    clearTimeout(patience)
    clearInterval(asking)
    if (source) share({ kind: 'state', state: state.value, last })
    else connect()
    ending.signal.addEventListener('abort', () => resolve(), { once: true })
  })

  const listen = ({ data }: MessageEvent<Shared>) => {
    if (data.kind === 'askState' && leading) share({ kind: 'state', state: state.value, last })
    if (leading || source || data.kind === 'askState') return
    clearTimeout(patience)
    if (data.kind === 'message') {
      take(data.data, data.last)
      return
    }
    // This page has listened since before it read: nothing was missed where the stream was open all the while.
    if (data.state === 'open') {
      gap = false
      if (!begun) read()
    }
    last = data.last
    state.value = data.state
  }

  const ask = () => {
    if (leading || source) return
    clearTimeout(patience)
    patience = setTimeout(connect, patienceMs)
    share({ kind: 'askState' })
  }

  const start = () => {
    if ('locks' in navigator) {
      channel = new BroadcastChannel(name)
      channel.onmessage = listen
      ask()
      asking = setInterval(ask, askEveryMs)
      navigator.locks.request(name, { signal: ending.signal }, lead).catch((reason: unknown) => {
        if (!ending.signal.aborted) throw reason
      })
    } else {
      void lead()
    }
    late = setTimeout(read, patienceMs)
    onStart()
  }

  const stop = () => {
    ending.abort()
    clearTimeout(retry)
    clearTimeout(patience)
    clearTimeout(late)
    clearInterval(asking)
    source?.close()
    channel?.close()
  }

  onMounted(start)
  onBeforeUnmount(stop)
  return { state }
}
