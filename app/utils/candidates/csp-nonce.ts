/**
 * The nonce that the page's content security policy gives to its own tags; undefined where there is none.
 * Browsers hide it from the attribute and keep it in the property.
 */
export function cspNonce(): string | undefined {
  return document.querySelector<HTMLElement>('script[nonce], style[nonce], link[nonce]')?.nonce || undefined
}
