/** A path of this site to go on to, from what an address asks for: never to another site. */
export function pathWithin(asked: string | string[] | undefined): string {
  const base = 'http://site.invalid'
  if (typeof asked !== 'string' || !URL.canParse(asked, base)) return '/'
  const url = new URL(asked, base)
  // A path of two slashes, which /.// comes to as well, is read by a browser as the name of another host.
  return url.origin === base && !url.pathname.startsWith('//') ? `${url.pathname}${url.search}${url.hash}` : '/'
}
