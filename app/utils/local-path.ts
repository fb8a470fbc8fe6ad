/**
 * A page of this site to return to; anything else, another site's address above all, becomes the list of studies.
 * @param wanted as it came in a query
 */
export function localPath(wanted: unknown): string {
  // A browser reads "//host" and "/\host" as another site.
  return typeof wanted === 'string' && /^\/(?![/\\])/.test(wanted) && !wanted.startsWith('/sign-in') ? wanted : '/studies'
}
