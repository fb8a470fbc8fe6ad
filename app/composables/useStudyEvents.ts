import type { StudyEvent } from '#shared/schemas/events'

/** connecting: the first try; open: events arrive; lost: trying again. */
export type EventsState = 'connecting' | 'open' | 'lost'
type Shared = { kind: 'message', data: string } | { kind: 'state', state: EventsState } | { kind: 'askState' }
type Handlers = {
  onEvent: (event: StudyEvent) => void
  /** read everything: first when events have begun to arrive, and again when some may have been missed */
  onReload: () => void
}

const firstWaitMs = 1000
const longestWaitMs = 15_000
/** How long the page waits for events to begin before it reads the rows without them. */
const patienceMs = 1500

/**
 * Events of one study. One page of a browser holds the stream and passes its messages on to the others
 * (HTTP/1.1 allows six connections to a server); when that page goes, the next one in the line of the lock takes over.
 */
export function useStudyEvents(studyId: string, { onEvent, onReload }: Handlers) {
  const state = ref<EventsState>('connecting')
  const channelName = `halfplane-study-${studyId}`
  let channel: BroadcastChannel | null = null
  let source: EventSource | null = null
  let leading = false
  let begun = false
  /** events may have passed that neither this page nor its last connection has seen */
  let gap = false
  let waitMs = firstWaitMs
  let retry: ReturnType<typeof setTimeout> | undefined
  let patience: ReturnType<typeof setTimeout> | undefined
  const ending = new AbortController()

  const share = (message: Shared) => channel?.postMessage(message)

  const read = () => {
    begun = true
    clearTimeout(patience)
    onReload()
  }

  const setState = (next: EventsState) => {
    state.value = next
    if (leading) share({ kind: 'state', state: next })
  }

  const take = (data: string) => {
    const event = JSON.parse(data) as StudyEvent
    if (event.reload || gap || !begun) read()
    gap = false
    onEvent(event)
  }

  const connect = () => {
    source?.close()
    source = new EventSource(`/api/studies/${studyId}/events`)
    source.onopen = () => {
      waitMs = firstWaitMs
      setState('open')
    }
    // A stream's first message says that it has joined: what is read from then on misses nothing.
    source.onmessage = ({ data }: MessageEvent<string>) => {
      share({ kind: 'message', data })
      take(data)
    }
    source.onerror = () => {
      setState('lost')
      // The browser tries again by itself after a dropped connection and names the last event it has, but not after an answer such as 503.
      if (source?.readyState !== EventSource.CLOSED) return
      gap = true
      retry = setTimeout(connect, waitMs)
      waitMs = Math.min(2 * waitMs, longestWaitMs)
    }
  }

  const lead = () => new Promise<void>((resolve) => {
    leading = true
    gap = begun
    connect()
    ending.signal.addEventListener('abort', () => resolve(), { once: true })
  })

  const listen = ({ data }: MessageEvent<Shared>) => {
    if (data.kind === 'askState' && leading) share({ kind: 'state', state: state.value })
    if (leading) return
    if (data.kind === 'message') take(data.data)
    if (data.kind === 'state') {
      setState(data.state)
      if (!begun) read()
    }
  }

  const start = () => {
    patience = setTimeout(() => {
      read()
      gap = true
    }, patienceMs)
    if (!('locks' in navigator)) {
      void lead()
      return
    }
    channel = new BroadcastChannel(channelName)
    channel.onmessage = listen
    share({ kind: 'askState' })
    navigator.locks.request(channelName, { signal: ending.signal }, lead).catch((reason: unknown) => {
      if (!ending.signal.aborted) throw reason
    })
  }

  const stop = () => {
    ending.abort()
    clearTimeout(retry)
    clearTimeout(patience)
    source?.close()
    channel?.close()
  }

  onMounted(start)
  onBeforeUnmount(stop)
  return { state }
}
