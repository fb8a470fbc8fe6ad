/** The address that people use, when it is configured. */
export function baseUrl(): URL | null {
  const text = process.env.BASE_URL
  return text && URL.canParse(text) ? new URL(text) : null
}

/** Whether people reach the server by https: cookies are Secure exactly then. */
export const overHttps = (): boolean => baseUrl()?.protocol === 'https:'
