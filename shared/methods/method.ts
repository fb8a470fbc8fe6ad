import type { SourceId } from './sources'

/** Sections of the Methods page. Their places are the numbers by which columns and refusals name them: “Methods §2”. */
export const sections = [
  'Model and notation', 'Geometry', 'Symbol error rate', 'Bit error rate', 'Required SNR', 'Information rates',
  'Channels and imperfections', 'Link budget, bandwidth, margin', 'Families and searches',
] as const

/** A formula in TeX, with a word on which case it is for where there are several. */
export interface Formula { tex: string, case?: string }

/** How a number of the product comes about. */
export interface Method {
  /** place in `sections` */
  section: number
  title: string
  /** a short paragraph; formulas follow it */
  text: string
  formulas: readonly Formula[]
  sources: readonly SourceId[]
  /** from tolerances.ts; left out where the method itself yields no number */
  tolerance?: string
}
