const escaped = (text: string) => text.replaceAll('&', '&amp;').replaceAll('<', '&lt;')

/** A plain page for the time in which the database is away; it looks again by itself. */
export const waitingPage = (reason: string, nonce = '') => `<!doctype html>
<html lang="en-GB">
<meta charset="utf-8">
<meta name="viewport" content="width=device-width, initial-scale=1">
<meta http-equiv="refresh" content="2">
<title>Halfplane is waiting for its database</title>
<style nonce="${nonce}">
  :root { color-scheme: light dark }
  body { margin: 0; min-height: 100vh; display: grid; place-items: center; font: 1rem/1.5 ui-monospace, monospace }
  main { max-width: 36rem; padding: 2rem; border: 1px solid }
</style>
<main>
  <h1>Halfplane is waiting for its database</h1>
  <p>${escaped(reason)} This page looks again every two seconds.</p>
</main>
</html>
`
