import type { NumberFormat } from '#shared/columns'

/** Number formats of the spreadsheet for those of the grid. */
export const spreadsheetFormats: Record<NumberFormat, string> = {
  '0.00': '0.00',
  '+0.00': '+0.00;-0.00;0.00',
  '0.0': '0.0',
  '0.000': '0.000',
  '0.00e-0': '0.00E+0',
  'integer': '0',
  'fraction': 'General',
  'plain': 'General',
}
