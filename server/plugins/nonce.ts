/** Script, style and preload tags of a page carry the nonce that its content security policy names. */
export default defineNitroPlugin((nitro) => {
  nitro.hooks.hook('render:html', (html, { event }) => {
    const { nonce } = event.context
    if (!nonce) return
    const marked = (part: string) => part.replace(/<(script|style|link)(?=[\s>])(?![^>]*\snonce=)/g, `<$1 nonce="${nonce}"`)
    html.head = html.head.map(marked)
    html.bodyPrepend = html.bodyPrepend.map(marked)
    html.body = html.body.map(part => part.replace(/<(script|style)(?=[\s>])(?![^>]*\snonce=)/g, `<$1 nonce="${nonce}"`))
    html.bodyAppend = html.bodyAppend.map(marked)
  })
})
