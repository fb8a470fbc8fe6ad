/** Cells of the link cases' sheet that the candidates' formulas refer to. */
export type LinkCells
  = | {
    from: 'link'
    /** of the case that decides: the one with the least C/N0 above its required margin, whatever the row */
    decidingCase: string
    /** dBHz */
    cOverN0: string
    /** dB */
    requiredMargin: string
    /** dBm/Hz */
    noiseDensity: string
  }
  | { from: 'entered', esN0: string }
  | { from: 'noiseDensity', n0: string }

export const linkSheetName = 'Link cases'
