/** A short identifier for a line or a case, unique within its list. Works without a secure context, unlike randomUUID. */
export function newKey(): string {
  return Array.from(crypto.getRandomValues(new Uint8Array(6)), byte => byte.toString(16).padStart(2, '0')).join('')
}
