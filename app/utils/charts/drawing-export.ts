/** Takes drawings out of the page: as SVG that needs nothing else, and as PNG. */

const presentation = [
  'fill', 'fill-opacity', 'stroke', 'stroke-width', 'stroke-opacity', 'stroke-dasharray', 'stroke-linecap', 'stroke-linejoin', 'opacity',
  'font-size', 'font-weight', 'text-anchor', 'paint-order',
]
const faces = '\'JetBrains Mono\', \'DejaVu Sans Mono\', Consolas, monospace'
const namespace = 'http://www.w3.org/2000/svg'

export type DrawingText = { text: string, width: number, height: number }

/** Does something while the page has the light sheet's colours; nothing is painted in between. */
function onLightSheet<T>(act: () => T): T {
  const { dataset } = document.documentElement
  const before = dataset.sheet
  dataset.sheet = 'light'
  try {
    return act()
  } finally {
    if (before === undefined) delete dataset.sheet
    else dataset.sheet = before
  }
}

/** Writes what the style sheets give to each element into the element's copy. */
function inline(original: Element, copy: Element) {
  const style = getComputedStyle(original)
  for (const property of presentation) copy.setAttribute(property, style.getPropertyValue(property))
  for (const name of ['class', 'style', 'tabindex', 'role']) copy.removeAttribute(name)
  for (let i = 0; i < original.children.length; i++) inline(original.children[i]!, copy.children[i]!)
}

/**
 * A drawing of the page as a file of its own: colours of the light sheet on its paper, styles as attributes, a named face.
 * Elements marked `data-screen-only` stay away; those marked `data-paper-only` are shown, and `data-paper-height` of the
 * drawing makes room for them.
 * @param layers of the drawing, the lowest first; it decides the size
 * @param title what the file says it is
 */
export function drawingText(layers: readonly [SVGSVGElement, ...SVGSVGElement[]], title: string): DrawingText {
  const [drawing] = layers
  const copy = drawing.cloneNode(true) as SVGSVGElement
  const paper = onLightSheet(() => {
    inline(drawing, copy)
    for (const layer of layers.slice(1)) {
      const over = layer.cloneNode(true) as SVGSVGElement
      inline(layer, over)
      copy.append(...over.children)
    }
    return `rgb(${getComputedStyle(document.documentElement).getPropertyValue('--paper').trim().split(/\s+/).join(', ')})`
  })
  for (const element of copy.querySelectorAll('[data-screen-only]')) element.remove()
  for (const element of copy.querySelectorAll('[data-paper-only]')) element.removeAttribute('display')
  const width = drawing.width.baseVal.value
  const height = Number(drawing.dataset.paperHeight ?? drawing.height.baseVal.value)
  for (const name of [...copy.getAttributeNames()].filter(name => /^(data|aria)-/.test(name))) copy.removeAttribute(name)
  copy.setAttribute('xmlns', namespace)
  copy.setAttribute('width', String(width))
  copy.setAttribute('height', String(height))
  copy.setAttribute('viewBox', `0 0 ${width} ${height}`)
  copy.setAttribute('font-family', faces)
  const ground = document.createElementNS(namespace, 'rect')
  for (const [name, value] of [['width', '100%'], ['height', '100%'], ['fill', paper]] as const) ground.setAttribute(name, value)
  const heading = document.createElementNS(namespace, 'title')
  heading.textContent = title
  copy.prepend(heading, ground)
  return { text: new XMLSerializer().serializeToString(copy), width, height }
}

/**
 * A drawing as PNG, twice as fine as on the screen.
 * @throws Error when the browser cannot draw it
 */
export async function drawingPicture({ text, width, height }: DrawingText, scale = 2): Promise<Blob> {
  const address = URL.createObjectURL(new Blob([text], { type: 'image/svg+xml' }))
  try {
    const image = new Image(width, height)
    image.src = address
    await image.decode()
    const canvas = document.createElement('canvas')
    canvas.width = Math.round(width * scale)
    canvas.height = Math.round(height * scale)
    canvas.getContext('2d')?.drawImage(image, 0, 0, canvas.width, canvas.height)
    return await new Promise((resolve, reject) => canvas.toBlob(
      blob => blob ? resolve(blob) : reject(new Error('This browser cannot make a picture of the drawing.')),
      'image/png',
    ))
  } finally {
    URL.revokeObjectURL(address)
  }
}

/** Hands a file to the reader. @param name with its ending */
export function saveFile(content: Blob, name: string) {
  const link = document.createElement('a')
  link.href = URL.createObjectURL(content)
  link.download = name
  link.click()
  // The download has begun when the click returns; the address may go once it has been read.
  setTimeout(() => URL.revokeObjectURL(link.href), 10_000)
}

/** A name for a file that every system takes. */
export function fileName(text: string, ending: string): string {
  return `${text.normalize('NFKD').replaceAll(/[^\p{L}\p{N}.+-]+/gu, '-').replaceAll(/^-+|-+$/g, '').slice(0, 80) || 'drawing'}.${ending}`
}
