/** What stands in the cell of an address: `sheet` is the one named, or else the formula's own. */
export type CellReader = (sheet: string | null, column: string, row: number) => number

type Token = { kind: 'number', value: number } | { kind: 'cell', sheet: string | null, column: string, row: number } | { kind: 'sign', text: string }

const pattern = /\s*(?:(\d+(?:\.\d+)?(?:E[+-]?\d+)?)|([A-Z][A-Z0-9]*)(?=\()|(?:'((?:[^']|'')+)'!)?\$?([A-Z]+)\$?(\d+)|([-+*/()]))/y

function tokensOf(formula: string): Token[] {
  const tokens: Token[] = []
  pattern.lastIndex = 0
  while (pattern.lastIndex < formula.length) {
    const at = pattern.lastIndex
    const [, number, name, sheet, column, row, sign] = pattern.exec(formula) ?? []
    if (number) tokens.push({ kind: 'number', value: Number(number) })
    else if (column) tokens.push({ kind: 'cell', sheet: sheet ?? null, column, row: Number(row) })
    else if (name ?? sign) tokens.push({ kind: 'sign', text: (name ?? sign)! })
    else throw new Error(`“${formula}” cannot be read from its character ${at + 1}.`)
  }
  return tokens
}

/**
 * Computes a formula of the workbook as a spreadsheet does: sums, products, LOG10, PI and cells.
 * @throws Error for anything else
 */
export function computeFormula(formula: string, read: CellReader): number {
  const tokens = tokensOf(formula)
  let at = 0
  const isSign = (text: string) => {
    const token = tokens[at]
    return token?.kind === 'sign' && token.text === text
  }
  const take = (text: string) => isSign(text) && at++ >= 0
  const demand = (text: string) => {
    if (!take(text)) throw new Error(`“${formula}” lacks “${text}”.`)
  }
  const atom = (): number => {
    if (take('-')) return -atom()
    if (take('(')) return closed()
    if (take('PI')) {
      demand('(')
      demand(')')
      return Math.PI
    }
    if (take('LOG10')) {
      demand('(')
      return Math.log10(closed())
    }
    const token = tokens[at++]
    if (token?.kind === 'number') return token.value
    if (token?.kind === 'cell') return read(token.sheet, token.column, token.row)
    throw new Error(`“${formula}” has no value where one belongs.`)
  }
  const product = (): number => {
    let value = atom()
    for (;;) {
      if (take('*')) value *= atom()
      else if (take('/')) value /= atom()
      else return value
    }
  }
  const sum = (): number => {
    let value = product()
    for (;;) {
      if (take('+')) value += product()
      else if (take('-')) value -= product()
      else return value
    }
  }
  const closed = (): number => {
    const value = sum()
    demand(')')
    return value
  }
  const value = sum()
  if (at < tokens.length) throw new Error(`“${formula}” goes on behind its end.`)
  return value
}
