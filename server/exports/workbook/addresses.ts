/**
 * Column letters of a sheet, A for 1, AA for 27.
 * @param index 1 and up
 */
export function columnLetters(index: number): string {
  let letters = ''
  for (let rest = index; rest > 0; rest = Math.floor((rest - 1) / 26)) {
    letters = String.fromCharCode(65 + (rest - 1) % 26) + letters
  }
  return letters
}

const sheetPrefix = (sheet: string) => /^[A-Za-z]+$/.test(sheet) ? `${sheet}!` : `'${sheet.replaceAll('\'', '\'\'')}'!`

/** Address of a cell that other sheets can use, fixed against filling and sorting. */
export const fixedAddress = (sheet: string, column: number, row: number) => `${sheetPrefix(sheet)}$${columnLetters(column)}$${row}`

/** A whole column of a sheet, fixed. */
export const wholeColumn = (sheet: string, letters: string) => `${sheetPrefix(sheet)}$${letters}:$${letters}`
