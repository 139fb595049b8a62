/** Where to go after sign-in: only ever a path of our own, whatever the address asked for. */
export function ownPath(next: unknown, fallback = "/"): string {
  if (typeof next !== "string" || next.length > 2000 || !next.startsWith("/")) return fallback;
  const base = "http://own.invalid";
  if (/[\p{Cc}\\]/u.test(next) || !URL.canParse(next, base)) return fallback;
  const url = new URL(next, base);
  // "//elsewhere" and its like resolve to another origin, or leave a path that would.
  if (url.origin !== base || url.pathname.startsWith("//")) return fallback;
  if (/^\/(api|sign-in|sign-up|confirm-address|second-step)(\/|$)/.test(url.pathname)) return fallback;
  return url.pathname + url.search + url.hash;
}
