/** What a cell holds; null for an empty one. */
export type Scalar = number | string | boolean | null

/** Where a formula finds other cells: `sheet` is the one named, or null for the formula's own. */
export interface CellReader {
  cell: (sheet: string | null, column: string, row: number) => Scalar
  /** last row of a sheet that holds anything: whole columns end there */
  lastRow: (sheet: string | null) => number
}

type Value = Scalar | Scalar[]
type Token
  = | { kind: 'value', value: Scalar }
    | { kind: 'cells', sheet: string | null, column: string, from: number, to: number | 'end' }
    | { kind: 'sign', text: string }

const pattern = new RegExp([
  String.raw`\s*(?:(\d+(?:\.\d+)?(?:E[+-]?\d+)?)`, // a number
  '"((?:[^"]|"")*)"', // a text
  String.raw`(TRUE|FALSE)\b`,
  String.raw`([A-Z][A-Z0-9]*)(?=\()`, // a function
  String.raw`(?:(?:'((?:[^']|'')+)'|([A-Za-z]+))!)?\$?([A-Z]+)(?:\$?(\d+)(?::\$?[A-Z]+\$?(\d+))?|:\$?[A-Z]+)`, // a cell, a part of a column, a column
  String.raw`(>=|<=|<>|[-+*/(),&<>=]))`,
].join('|'), 'y')

function tokensOf(formula: string): Token[] {
  const tokens: Token[] = []
  pattern.lastIndex = 0
  while (pattern.lastIndex < formula.length) {
    const at = pattern.lastIndex
    const [, number, text, truth, name, quoted, plain, column, from, to, sign] = pattern.exec(formula) ?? []
    if (number) tokens.push({ kind: 'value', value: Number(number) })
    else if (text !== undefined) tokens.push({ kind: 'value', value: text.replaceAll('""', '"') })
    else if (truth) tokens.push({ kind: 'value', value: truth === 'TRUE' })
    else if (column) tokens.push({ kind: 'cells', sheet: quoted ?? plain ?? null, column, from: Number(from ?? 1), to: from ? Number(to ?? from) : 'end' })
    else if (name ?? sign) tokens.push({ kind: 'sign', text: (name ?? sign)! })
    else throw new Error(`“${formula}” cannot be read from its character ${at + 1}.`)
  }
  return tokens
}

const one = (value: Value | undefined): Scalar => Array.isArray(value) ? value[0] ?? null : value ?? null
const number = (value: Value | undefined) => {
  const scalar = one(value)
  if (typeof scalar === 'string') throw new Error(`“${scalar}” stands where a number belongs.`)
  return Number(scalar)
}
const text = (value: Value | undefined) => String(one(value) ?? '')
const list = (value: Value | undefined) => Array.isArray(value) ? value : [one(value)]

/** Functions of a spreadsheet, as OOXML defines those that the workbook uses. */
const functions: Record<string, (...values: Value[]) => Value> = {
  PI: () => Math.PI,
  ABS: x => Math.abs(number(x)),
  INT: x => Math.floor(number(x)),
  ROUNDUP: (x, digits) => Math.sign(number(x)) * Math.ceil(Math.abs(number(x)) * 10 ** number(digits)) / 10 ** number(digits),
  LOG10: x => Math.log10(number(x)),
  MIN: (...values) => Math.min(...values.flatMap(list).map(number)),
  MAX: (...values) => Math.max(...values.flatMap(list).map(number)),
  AND: (...values) => values.flatMap(list).every(Boolean),
  IF: (condition, yes, no) => one(condition) ? yes ?? null : no ?? false,
  ISBLANK: x => one(x) === null,
  FIXED: (x, digits) => Number.isNaN(number(x)) || Number.isNaN(number(digits)) ? '' : number(x).toFixed(number(digits)),
  MID: (x, start, length) => text(x).slice(number(start) - 1, number(start) - 1 + number(length)),
  INDEX: (values, at) => list(values)[number(at) - 1] ?? null,
  MATCH: (value, values) => {
    const at = list(values).indexOf(one(value))
    if (at < 0) throw new Error(`${text(value)} is not found.`)
    return at + 1
  },
}

const comparisons: Record<string, (a: Scalar, b: Scalar) => boolean> = {
  '=': (a, b) => (a ?? '') === (b ?? ''),
  '<>': (a, b) => (a ?? '') !== (b ?? ''),
  '<': (a, b) => number(a) < number(b),
  '>': (a, b) => number(a) > number(b),
  '<=': (a, b) => number(a) <= number(b),
  '>=': (a, b) => number(a) >= number(b),
}

/**
 * Computes a formula of the workbook as a spreadsheet does, from what stands in its cells.
 * @throws Error for a function that the workbook does not use
 */
export function computeFormula(formula: string, read: CellReader): Scalar {
  const tokens = tokensOf(formula)
  let at = 0
  const sign = () => {
    const token = tokens[at]
    return token?.kind === 'sign' ? token.text : null
  }
  const take = (...texts: string[]) => {
    const found = sign()
    if (found === null || !texts.includes(found)) return null
    at++
    return found
  }
  const demand = (wanted: string) => {
    if (!take(wanted)) throw new Error(`“${formula}” lacks “${wanted}”.`)
  }
  const call = (name: string): Value => {
    const values: Value[] = []
    demand('(')
    if (!take(')')) {
      do values.push(comparison())
      while (take(','))
      demand(')')
    }
    return functions[name]!(...values)
  }
  const cells = ({ sheet, column, from, to }: Extract<Token, { kind: 'cells' }>): Value => {
    if (from === to) return read.cell(sheet, column, from)
    const last = to === 'end' ? read.lastRow(sheet) : to
    return Array.from({ length: last - from + 1 }, (_, i) => read.cell(sheet, column, from + i))
  }
  const atom = (): Value => {
    if (take('-')) return -number(atom())
    if (take('(')) {
      const value = comparison()
      demand(')')
      return value
    }
    const name = take(...Object.keys(functions))
    if (name) return call(name)
    const token = tokens[at++]
    if (token?.kind === 'value') return token.value
    if (token?.kind === 'cells') return cells(token)
    throw new Error(`“${formula}” has no value where one belongs.`)
  }
  const product = (): Value => {
    let value = atom()
    for (let found = take('*', '/'); found; found = take('*', '/')) value = found === '*' ? number(value) * number(atom()) : number(value) / number(atom())
    return value
  }
  const sum = (): Value => {
    let value = product()
    for (let found = take('+', '-'); found; found = take('+', '-')) value = found === '+' ? number(value) + number(product()) : number(value) - number(product())
    return value
  }
  const joined = (): Value => {
    let value = sum()
    while (take('&')) value = text(value) + text(sum())
    return value
  }
  const comparison = (): Value => {
    const value = joined()
    const found = take(...Object.keys(comparisons))
    return found ? comparisons[found]!(one(value), one(joined())) : value
  }
  const value = comparison()
  if (at < tokens.length) throw new Error(`“${formula}” goes on behind its end.`)
  return one(value)
}
