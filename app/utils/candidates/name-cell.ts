import type { ICellRendererComp, ICellRendererParams } from 'ag-grid-community'
import type { Candidate } from '#shared/schemas/candidates'
import { pinStyle } from '../pin-style'

export type NameParams = { text: (row: Candidate) => string, pin: (row: Candidate) => number | null }
type Params = ICellRendererParams<Candidate> & { cell: NameParams }

const svg = 'http://www.w3.org/2000/svg'

/** A sample of a pinned row's line: its colour, dash and marker. */
function lineSample(slot: number): SVGElement {
  const { colour, dash, marker, markerName } = pinStyle(slot)
  const drawing = document.createElementNS(svg, 'svg')
  drawing.setAttribute('viewBox', '0 0 32 12')
  drawing.setAttribute('class', 'cell-sample')
  drawing.setAttribute('role', 'img')
  drawing.setAttribute('aria-label', `pinned, line ${slot}, ${markerName}`)
  const line = document.createElementNS(svg, 'path')
  line.setAttribute('d', 'M0 6H32')
  line.setAttribute('stroke-dasharray', dash)
  const sign = document.createElementNS(svg, 'path')
  sign.setAttribute('d', marker)
  sign.setAttribute('transform', 'translate(16 6)')
  for (const part of [line, sign]) {
    part.style.stroke = colour
    part.style.fill = part === sign ? 'rgb(var(--paper))' : 'none'
    part.setAttribute('stroke-width', '1.5')
    drawing.append(part)
  }
  return drawing
}

/** The Name cell: the row's line when it is pinned, then its name. */
export class NameCell implements ICellRendererComp<Candidate> {
  private readonly gui = document.createElement('span')

  init(params: Params) {
    this.gui.className = 'cell-name'
    this.refresh(params)
  }

  refresh({ data, cell }: Params) {
    this.gui.replaceChildren()
    if (!data) return true
    const slot = cell.pin(data)
    if (slot !== null) this.gui.append(lineSample(slot))
    this.gui.append(cell.text(data))
    return true
  }

  getGui() {
    return this.gui
  }
}
