const date = new Intl.DateTimeFormat('en-GB', { day: 'numeric', month: 'short', year: 'numeric', timeZone: 'UTC' })
const time = new Intl.DateTimeFormat('en-GB', { hour: '2-digit', minute: '2-digit', timeZone: 'UTC' })

/** The day of an instant, in UTC: the server's and the browser's first paint then agree. */
export function dayText(iso: string): string {
  return date.format(new Date(iso))
}

/** Day and minute of an instant, in UTC, which it says. */
export function instantText(iso: string): string {
  const at = new Date(iso)
  return `${date.format(at)}, ${time.format(at)} UTC`
}
