/**
 * Which kept file answers an address.
 * @param address  absolute
 * @param scope  address of the page's folder, with a slash at its end
 * @param files  names of the kept files, relative to the scope; the page itself is ""
 * @returns null for an address that none of them answers
 */
export function fileAt(address: string, scope: string, files: ReadonlySet<string>): string | null {
  const { origin, pathname } = new URL(address);
  const folder = new URL(scope);
  if (origin !== folder.origin || !pathname.startsWith(folder.pathname)) return null;
  const name = pathname.slice(folder.pathname.length);
  const file = name === 'index.html' ? '' : name;
  return files.has(file) ? file : null;
}
