/** Host name of a `Host` header without its port: `localhost`, `[::1]`. */
export function hostName(host: string): string {
  return host.toLowerCase().replace(/:\d+$/u, "");
}

export function isAllowedHost(host: string | undefined | null, allowedHosts: readonly string[]): boolean {
  return host ? allowedHosts.includes(hostName(host)) : false;
}

/**
 * Whether a request that changes state comes from our own pages: the Origin names the very host that was asked,
 * and the browser does not call the fetch cross-site.
 */
export function isOwnOrigin(headers: {
  origin?: string | null;
  host?: string | null;
  fetchSite?: string | null;
}): boolean {
  const { origin, host, fetchSite } = headers;
  if (!origin || !host || origin === "null") return false;
  if (fetchSite && fetchSite !== "same-origin") return false;
  try {
    return new URL(origin).host.toLowerCase() === host.toLowerCase();
  } catch {
    return false;
  }
}
