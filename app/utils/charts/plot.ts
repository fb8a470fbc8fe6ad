import { scaleLinear } from 'd3'
import type { ScaleLinear } from 'd3'
import type { Frame } from './along'
import type { View } from './view'

/** Scales of a plot and where it lies in its drawing, in pixels. */
export type Plot = { width: number, height: number, frame: Frame, x: ScaleLinear<number, number>, y: ScaleLinear<number, number> }

const margin = { left: 58, top: 30, right: 18, bottom: 42 }

/** The plot of a view in a drawing so wide: a little lower than wide, within what reads well. */
export function plotOf(width: number, { x, y }: View): Plot {
  const height = Math.round(Math.min(480, Math.max(300, width * 0.66)))
  const frame = { left: margin.left, top: margin.top, right: width - margin.right, bottom: height - margin.bottom }
  return { width, height, frame, x: scaleLinear(x, [frame.left, frame.right]), y: scaleLinear(y, [frame.bottom, frame.top]) }
}
