import katex from 'katex'
import { columns, headerOf, plain } from '#shared/columns'
import { methodIds, methods, sections, sources } from '#shared/methods'
import type { Formula, MethodId, SourceId } from '#shared/methods'
import { checks, publishedOf } from '#shared/methods/checks'
import type { Check } from '#shared/methods/checks'
import { coreVersion } from '#shared/modulation'
import type { ChecksAnswer, MethodOfAnswer, MethodsAnswer } from '#shared/schemas/methods'
import { compute } from '../compute/pool'

/** Digits of a published closed form that are shown. */
const digitsShown = 10

const setFormula = ({ tex, case: which }: Formula) => ({
  case: which ?? null, tex, html: katex.renderToString(tex, { displayMode: true, fleqn: true, output: 'htmlAndMathml' }),
})

/** A number in the digits shown: small ones with their power of ten. */
const inDigits = (value: number) => Math.abs(value) < 1e-3 && value !== 0
  ? value.toExponential(digitsShown - 1).replace(/-/g, '−')
  : plain(Number(value.toPrecision(digitsShown)))
const shortly = (tolerance: number) => (tolerance < 1e-3 ? tolerance.toExponential() : String(tolerance)).replace('-', '−')

function publishedText(check: Check): string {
  return typeof check.published === 'string' ? check.published.replace(/-/g, '−') : inDigits(publishedOf(check))
}

function toleranceText({ published, within }: Check): string {
  if (typeof within === 'number') return within === 0 ? 'exact' : shortly(within)
  if (within) return `${shortly(within.relative)} relative`
  return typeof published === 'string' ? 'last digit' : '1e−9 relative'
}

/** Sources by number, in the order in which the page first names them. */
function numberedSources() {
  const order: SourceId[] = []
  const numberOf = (id: SourceId) => {
    if (!order.includes(id)) order.push(id)
    return order.indexOf(id) + 1
  }
  return { order, numberOf }
}

function describeMethod(id: MethodId, numberOf: (source: SourceId) => number): MethodOfAnswer {
  const { title, text, formulas, sources: named, tolerance } = methods[id]
  return {
    id, title, text, formulas: formulas.map(setFormula), sources: named.map(numberOf), tolerance: tolerance ?? null,
    columns: columns.flatMap(column => column.kind === 'computed' && column.method === id
      ? [{ id: column.id, title: headerOf(column), meaning: column.meaning, formula: column.formula, tolerance: column.tolerance }]
      : []),
    checks: checks.filter(check => check.method === id).map(check => ({
      id: check.id, what: check.what, unit: check.unit ?? null, published: publishedText(check), source: numberOf(check.source),
      place: check.place ?? null, fromMemory: check.memory ?? false, tolerance: toleranceText(check),
    })),
  }
}

function describeMethods(): MethodsAnswer {
  const { order, numberOf } = numberedSources()
  const described = methodIds.map(id => ({ section: methods[id].section, method: describeMethod(id, numberOf) }))
  return {
    sections: sections.map((title, number) => ({ number, title, methods: described.filter(({ section }) => section === number).map(({ method }) => method) })),
    entered: columns.flatMap(column => column.kind === 'input' ? [{ id: column.id, title: headerOf(column), meaning: column.meaning }] : []),
    sources: order.map(id => sources[id]),
  }
}

let page: MethodsAnswer | undefined

/** The methods as their page shows them: made once, for they change with the build alone. */
export const methodsPage = (): MethodsAnswer => page ??= describeMethods()

let values: Promise<ChecksAnswer> | undefined

/**
 * What this build computes for every published value: computed once, in a worker, when first asked for.
 * @throws ComputationFailed when the worker breaks down; the next call tries again
 */
export function checkValues(): Promise<ChecksAnswer> {
  values ??= compute({ kind: 'checks', asked: null }, { priority: 'evaluation' }).then(items => ({ coreVersion, items }), (error) => {
    values = undefined
    throw error
  })
  return values
}
