/** The two sheets, and the third choice that leaves it to the system. */
export const sheets = [
  { value: 'light', title: 'Light sheet' },
  { value: 'dark', title: 'Dark sheet' },
  { value: 'system', title: 'As the system' },
] as const
export type Sheet = (typeof sheets)[number]['value']

const isSheet = (value: unknown): value is Sheet => sheets.some(sheet => sheet.value === value)

/** The reader's choice of sheet, kept in a cookie so that the first paint already has it. */
export function useSheet() {
  const cookie = useCookie<string>('sheet', { default: () => 'system', maxAge: 60 * 60 * 24 * 365, sameSite: 'lax', path: '/' })
  return computed<Sheet>({
    get: () => isSheet(cookie.value) ? cookie.value : 'system',
    set: (sheet) => { cookie.value = sheet },
  })
}
