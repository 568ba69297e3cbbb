const FALLBACK = "/benches";
const ANCHOR = "http://stepwell.invalid";
const OWN_WAYS = /^\/(?:sign-in|first-run|api)(?:[/?#]|$)/u;

/**
 * Where to go after signing in: a path of this site, or the benches.
 *
 * Anything that a browser could take for another host is refused (`//host`, `/\host`, a scheme), and so are the
 * sign-in pages themselves and what is no page.
 */
export function safeNext(next: string | readonly string[] | undefined): string {
  if (typeof next !== "string" || !next.startsWith("/")) return FALLBACK;
  const parsed = URL.canParse(next, ANCHOR) ? new URL(next, ANCHOR) : null;
  if (!parsed || parsed.origin !== ANCHOR || parsed.pathname.startsWith("//")) return FALLBACK;
  const path = `${parsed.pathname}${parsed.search}${parsed.hash}`;
  return OWN_WAYS.test(path) || path === "/" ? FALLBACK : path;
}
