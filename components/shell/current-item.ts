export type Place = { href: string; label: string; count?: number; exact?: boolean };

/** The item whose address is the longest beginning of the page's address; whole path segments only. */
export function currentHref(items: readonly Place[], pathname: string): string | undefined {
  let best: string | undefined;
  for (const { href, exact } of items) {
    const path = href.split(/[?#]/)[0] ?? href;
    const fits = pathname === path || (!exact && pathname.startsWith(path === "/" ? "/" : `${path}/`));
    if (fits && (best === undefined || path.length > best.length)) best = href;
  }
  return best;
}
