import { ref } from 'vue'
import type { Frame } from './along'
import type { Place } from './curves'
import type { Plot } from './plot'
import type { Quantity } from './quantities'
import { between, including, magnified } from './view'
import type { View } from './view'

type Controlled = {
  plot: () => Plot
  quantity: () => Quantity
  view: () => View
  cross: () => Place | null
  setView: (view: View) => void
  setCross: (cross: Place | null) => void
  whole: () => void
  /** the cross-hair was moved by the keyboard: its values are to be read out */
  moved: () => void
}

/** Steps of the arrow keys, in decades and bit per symbol upwards, and how much longer they are with Shift */
const step = { snrDb: 0.1, decades: 0.1, bits: 0.02, shift: 10 }
const keyFactor = 1.5
/** A press that moves less than this is a click, in pixels. */
const slack = 6

/** Cross-hair and zoom of a plot, by pointer and by keyboard. */
export function usePlotControls({ plot, quantity, view, cross, setView, setCross, whole, moved }: Controlled) {
  /** box that is being drawn, in pixels */
  const band = ref<Frame | null>(null)
  let start: Place | null = null

  const pixelOf = (event: MouseEvent): Place => {
    const { left, top } = (event.currentTarget as Element).getBoundingClientRect()
    const { frame } = plot()
    return [
      Math.min(frame.right, Math.max(frame.left, event.clientX - left)),
      Math.min(frame.bottom, Math.max(frame.top, event.clientY - top)),
    ]
  }
  const placeOf = ([x, y]: Place): Place => [plot().x.invert(x), plot().y.invert(y)]

  const pointerdown = (event: PointerEvent) => {
    if (event.button !== 0) return
    start = pixelOf(event);
    (event.currentTarget as Element).setPointerCapture(event.pointerId)
  }
  const pointermove = (event: PointerEvent) => {
    const now = pixelOf(event)
    setCross(placeOf(now))
    if (!start || (Math.abs(now[0] - start[0]) < slack && Math.abs(now[1] - start[1]) < slack)) band.value = null
    else band.value = { left: Math.min(start[0], now[0]), right: Math.max(start[0], now[0]), top: Math.min(start[1], now[1]), bottom: Math.max(start[1], now[1]) }
  }
  const pointerup = () => {
    const box = band.value
    start = null
    band.value = null
    if (box) setView(between(quantity(), placeOf([box.left, box.top]), placeOf([box.right, box.bottom])))
  }
  const cancel = () => {
    start = null
    band.value = null
  }
  /** A plot without the focus lets the page scroll by. */
  const wheel = (event: WheelEvent) => {
    if (!event.ctrlKey && document.activeElement !== event.currentTarget) return
    event.preventDefault()
    setView(magnified(view(), quantity(), placeOf(pixelOf(event)), Math.exp(-Math.max(-60, Math.min(60, event.deltaY)) / 200)))
  }

  const middle = (): Place => [(view().x[0] + view().x[1]) / 2, (view().y[0] + view().y[1]) / 2]
  const zoom = (factor: number) => setView(magnified(view(), quantity(), cross() ?? middle(), factor))
  const arrow = (dx: number, dy: number) => {
    const [x, y] = cross() ?? middle()
    const to: Place = [Math.round((x + dx * step.snrDb) * 1e3) / 1e3, Math.round((y + dy * (quantity().logarithmic ? step.decades : step.bits)) * 1e3) / 1e3]
    setCross(to)
    const next = including(view(), quantity(), to)
    if (next.x[0] !== view().x[0] || next.y[0] !== view().y[0]) setView(next)
    moved()
  }
  const keydown = (event: KeyboardEvent) => {
    if (event.altKey || event.ctrlKey || event.metaKey) return
    const far = event.shiftKey ? step.shift : 1
    const act = {
      'ArrowLeft': () => arrow(-far, 0), 'ArrowRight': () => arrow(far, 0),
      'ArrowUp': () => arrow(0, far), 'ArrowDown': () => arrow(0, -far),
      '+': () => zoom(keyFactor), '=': () => zoom(keyFactor), '-': () => zoom(1 / keyFactor), '0': whole,
      'Escape': () => {
        cancel()
        setCross(null)
      },
    }[event.key]
    if (!act) return
    event.preventDefault()
    act()
  }

  return { band, zoom, listeners: { pointerdown, pointermove, pointerup, pointercancel: cancel, wheel, keydown } }
}
