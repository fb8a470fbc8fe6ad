const open = new Set<() => void>()

/**
 * Remembers an open answer that would hold up the server's end, such as an event stream.
 * @param close ends it
 * @returns how to forget it
 */
export function registerStream(close: () => void): () => void {
  open.add(close)
  return () => open.delete(close)
}

/** Ends all open answers. */
export function closeAllStreams(): void {
  for (const close of [...open]) close()
  open.clear()
}
