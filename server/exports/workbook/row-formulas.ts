import { isInterval } from '#shared/modulation/estimate'
import type { Candidate } from '#shared/schemas/candidates'
import type { Requirements } from '#shared/schemas/requirements'
import type { CandidateValues } from '#shared/schemas/values'
import { byId, exactId, roundedColumns } from './candidates-layout'
import type { CandidatesLayout } from './candidates-layout'
import type { LinkCells } from './link-cells'
import { ceilFormula, floorFormula } from './rounding-formulas'
import { limitWords } from './summary-cells'
import type { SummaryCells } from './summary-cells'
import { verdictFormula } from './verdict-formula'

/** Where the candidates' formulas find what is not in their own row. */
export interface StudyCells {
  requirements: Requirements
  summary: SummaryCells
  link: LinkCells
}

type Cell = (id: string) => string
type Formulas = Record<string, string | null>

/** An entered scheme counts as one symbol of two real dimensions at unit mean energy, as in server/compute. */
const entered = { dimensions: '2', meanEnergy: '1' }

function rates(values: CandidateValues, cell: Cell, { requirements, summary }: StudyCells): Formulas {
  const dimensions = values.dimensions === null ? entered.dimensions : cell('dimensions')
  const bandwidthPerRate = `${dimensions}*(1+${cell('rollOffUsed')})/${summary.dimensionsPerInterval}`
  const bits = `${cell('netBits')}*(1-${summary.overhead})`
  const followed: Formulas = {
    symbolRate: requirements.heldConstant.kind === 'occupiedBandwidth' ? `${summary.held}/(${bandwidthPerRate})` : `${summary.held}/(${bits})`,
    occupiedBandwidth: `${cell('symbolRate')}*${bandwidthPerRate}`,
    netRate: `${cell('symbolRate')}*${bits}`,
  }
  const held = { symbolRate: 'symbolRate', occupiedBandwidth: 'occupiedBandwidth', netBitRate: 'netRate' }[requirements.heldConstant.kind]
  return { ...followed, [held]: summary.held, spectralEfficiency: `${cell('netRate')}/${cell('occupiedBandwidth')}` }
}

function available(values: CandidateValues, cell: Cell, { summary, link }: StudyCells): string {
  const backOff = `IF(${summary.limitedBy}="${limitWords.peakPower}",${cell('backOffValue')},0)`
  switch (link.from) {
    case 'link': return `${link.cOverN0}-${backOff}-10*LOG10(${cell('symbolRate')}*1E6)`
    case 'entered': return `${link.esN0}-${backOff}`
    case 'noiseDensity': return `10*LOG10(${values.meanEnergy === null ? entered.meanEnergy : cell('meanEnergy')}/${link.n0})`
  }
}

function exact(values: CandidateValues, cell: Cell, cells: StudyCells): Formulas {
  const availableCell = cell(exactId('availableEsN0'))
  const threshold = cells.link.from === 'link' && `${cells.link.noiseDensity}+10*LOG10(${cell('symbolRate')}*1E6)+${cell('requiredUsed')}+${cell('lossUsed')}`
  return {
    [exactId('availableEsN0')]: available(values, cell, cells),
    [exactId('availableEbN0')]: `${availableCell}-10*LOG10(${cell('netBits')})`,
    [exactId('receiverThreshold')]: threshold || null,
    [exactId('margin')]: `${availableCell}-${cell('requiredUsed')}-${cell('lossUsed')}`,
    [exactId('surplus')]: `${cell(exactId('margin'))}-${cell('requiredMargin')}`,
  }
}

const rounded = (cell: Cell): Formulas => Object.fromEntries(roundedColumns.map(({ id, round, digits }) =>
  [id, (round === 'down' ? floorFormula : ceilFormula)(cell(exactId(id)), digits)]))

const distances = (cell: Cell, { summary }: StudyCells): Formulas => {
  const distance = {
    netBitRate: (limit: string) => `${cell('netRate')}-${limit}`,
    occupiedBandwidth: (limit: string) => `${limit}-${cell('occupiedBandwidth')}`,
    spectralEfficiency: (limit: string) => `${cell('spectralEfficiency')}-${limit}`,
    papr: (limit: string) => `${limit}-${cell('papr')}`,
  }
  return Object.fromEntries([...summary.mustHaves].flatMap(([kind, { value }]) => kind === 'margin' ? [] : [[byId({ kind }), distance[kind](value)]]))
}

/** The row's own input, or the study's where its cell is empty. */
const ownOr = (own: string, study: string) => `IF(ISBLANK(${own}),${study},${own})`

/**
 * Cells of one candidate that the spreadsheet goes on computing, by column id; each refers to its own row and to the study's inputs, each
 * of which stands once, on the summary or among the link cases. What only the core computes (required Es/N0, back-off, geometry, error
 * rates) stays a number.
 * @param row a candidate with values
 * @param number of its row on the sheet
 */
export function rowFormulas({ values }: Candidate, number: number, { letters }: CandidatesLayout, cells: StudyCells): Formulas {
  if (!values || values.requiredEsN0Db === null) return {}
  const { summary, link, requirements } = cells
  const cell = (id: string) => `${letters(id)}${number}`
  return {
    // An interval counts at its unfavourable end, which stays the number that the core found.
    requiredUsed: isInterval(values.requiredEsN0Db) ? null : cell('requiredEsN0'),
    lossUsed: ownOr(cell('implementationLossDb'), summary.implementationLoss),
    rollOffUsed: ownOr(cell('rollOff'), summary.rollOff),
    ...rates(values, cell, cells),
    requiredEbN0: `${cell('requiredEsN0')}-10*LOG10(${cell('netBits')})`,
    requiredEpkN0: `${cell('requiredEsN0')}+${cell('papr')}`,
    requiredMargin: link.from === 'link' ? link.requiredMargin : summary.mustHaves.get('margin')?.value ?? null,
    decidingCase: link.from === 'link' ? link.decidingCase : null,
    ...exact(values, cell, cells),
    ...rounded(cell),
    ...distances(cell, cells),
    verdict: verdictFormula(values, cell, requirements.mustHaves, summary),
  }
}
