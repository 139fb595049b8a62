export type Place = {
  href: string;
  label: string;
  count?: number;
  exact?: boolean;
  also?: readonly string[];
};

/**
 * The item whose address is the longest beginning of the page's address; whole path segments only. `also` names
 * lists that belong to the same place.
 */
export function currentHref(items: readonly Place[], pathname: string): string | undefined {
  let best: string | undefined;
  let length = -1;
  for (const { href, exact, also = [] } of items) {
    for (const address of [href, ...also]) {
      const path = address.split(/[?#]/)[0] ?? address;
      const fits = pathname === path || (!exact && pathname.startsWith(path === "/" ? "/" : `${path}/`));
      if (fits && path.length > length) {
        best = href;
        length = path.length;
      }
    }
  }
  return best;
}
