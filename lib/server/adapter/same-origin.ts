/**
 * Whether a request was sent by one of our own pages: browsers say so in `Sec-Fetch-Site`, older ones by an `Origin`
 * equal to the host asked. Neither can be set by another site's page. What the host is called outside is taken from
 * `X-Forwarded-Host` only behind a proxy that is trusted to write it. A request that says nothing is not ours.
 * Source: OWASP, Cross-Site Request Forgery Prevention (Fetch Metadata; verifying origin with standard headers).
 */
export function isSameOrigin(headers: Headers, isBehindProxy: boolean): boolean {
  const site = headers.get("sec-fetch-site");
  if (site !== null) return site === "same-origin";
  const origin = headers.get("origin");
  const forwarded = isBehindProxy ? headers.get("x-forwarded-host") : null;
  const host = forwarded ?? headers.get("host");
  return origin !== null && host !== null && URL.canParse(origin) && new URL(origin).host === host;
}
