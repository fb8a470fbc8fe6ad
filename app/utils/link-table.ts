import { formatNumber } from '#shared/columns/format'
import { availableEsN0Db, linkCase } from '#shared/modulation/link'
import type { LinkCaseResult, LinkStep } from '#shared/modulation/link'
import type { LinkLine, Requirements } from '#shared/schemas/requirements'

/** A case as its table shows it: the numbers, or the sentence that says why there are none. */
export type CaseTable = { result: LinkCaseResult, sentence?: undefined } | { result?: undefined, sentence: string }

/** Sums up the lines of a case; mistakes in them become a sentence. */
export function caseTable(lines: readonly LinkLine[]): CaseTable {
  try {
    return { result: linkCase(lines) }
  } catch (thrown) {
    return { sentence: thrown instanceof Error ? thrown.message : String(thrown) }
  }
}

/** Symbol rate in Hz where the study holds it constant; null where each candidate has its own. */
export function heldSymbolRate({ heldConstant: { kind, value } }: Requirements): number | null {
  return kind === 'symbolRate' && value > 0 ? value * 1e6 : null
}

/** Es/N0 in dB that a case delivers before any back-off; null without a symbol rate common to all. */
export function availableAtSaturation(result: LinkCaseResult, symbolRateHz: number | null): number | null {
  return symbolRateHz === null ? null : availableEsN0Db(result.cOverN0DbHz, symbolRateHz, 0)
}

/** What a line adds, signed, with its unit. */
export function stepText({ line, valueDb }: LinkStep, unit: string): string {
  switch (line.kind) {
    case 'power': return `${formatNumber(valueDb, '+0.00')} ${unit}`
    case 'noiseFigure': return `${formatNumber(valueDb, '0.00')} ${unit}/Hz`
    case 'gain': return `${formatNumber(valueDb, '+0.00')} dB`
    default: return `${formatNumber(-valueDb, '+0.00')} dB`
  }
}

/** Kinds of line, in the order in which they are offered. */
export const lineKinds = {
  power: 'Power',
  gain: 'Gain',
  loss: 'Loss',
  freeSpaceLoss: 'Free-space loss',
  noiseFigure: 'Noise figure',
} as const

/** A new line of a kind, with values that compute at once. */
export function newLine(kind: LinkLine['kind']): LinkLine {
  const base = { id: newKey(), name: lineKinds[kind], source: '' }
  switch (kind) {
    case 'power': return { ...base, kind, unit: 'dBm', valueDb: 0 }
    case 'freeSpaceLoss': return { ...base, kind, frequencyGhz: 1, distanceKm: 1 }
    case 'noiseFigure': return { ...base, kind, noiseFigureDb: 5 }
    default: return { ...base, kind, valueDb: 0 }
  }
}
