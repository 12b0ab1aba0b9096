/** What the headers depend on. */
export type HeaderSettings = {
  readonly nonce: string;
  readonly isDevelopment: boolean;
  readonly isHttps: boolean;
  /** Address of a map style of one's own choice; its tiles and letters come from elsewhere as well. */
  readonly mapStyleUrl: string | null;
};

/**
 * The two style sheets that sonner puts into the page without a nonce: first an empty element, then its text.
 * A test works them out again from the installed package.
 */
export const SONNER_STYLE_HASHES = [
  "sha256-47DEQpj8HBSa+/TImW+5JCeuQeRkm5NMpJWZG3hSuFU=",
  "sha256-StEaX+se6YS7pqjzrzMIA0KaX9zF/8zAhvQXZAe5epY=",
] as const;

/** The content security policy: only our own files, scripts only with this answer's nonce. */
export function contentSecurityPolicy(settings: HeaderSettings): string {
  const { nonce, isDevelopment, isHttps } = settings;
  const elsewhere = settings.mapStyleUrl === null ? [] : ["https:"];
  // The development server swaps modules by eval and reports over a web socket.
  const developmentScript = isDevelopment ? ["'unsafe-eval'"] : [];
  // It also draws its own panel of errors with styles of its own.
  const styles = isDevelopment
    ? ["'unsafe-inline'"]
    : [`'nonce-${nonce}'`, ...SONNER_STYLE_HASHES.map((hash) => `'${hash}'`)];
  const developmentConnect = isDevelopment ? ["ws:"] : [];
  const directives: Readonly<Record<string, readonly string[]>> = {
    "default-src": ["'self'"],
    "script-src": ["'self'", `'nonce-${nonce}'`, "'strict-dynamic'", ...developmentScript],
    "style-src": ["'self'", ...styles],
    "style-src-attr": ["'unsafe-inline'"],
    "img-src": ["'self'", "data:", "blob:", ...elsewhere],
    "font-src": ["'self'"],
    "connect-src": ["'self'", ...developmentConnect, ...elsewhere],
    "worker-src": ["'self'"],
    "object-src": ["'none'"],
    "base-uri": ["'none'"],
    "form-action": ["'self'"],
    "frame-ancestors": ["'none'"],
    ...(isHttps ? { "upgrade-insecure-requests": [] } : {}),
  };
  return Object.entries(directives)
    .map(([name, sources]) => [name, ...sources].join(" "))
    .join("; ");
}

/** One year, as OWASP ASVS 5.0, 3.4.1 asks. */
const HSTS = "max-age=31536000; includeSubDomains";

/** The headers every page carries, by name. */
export function securityHeaders(settings: HeaderSettings): Readonly<Record<string, string>> {
  return {
    "content-security-policy": contentSecurityPolicy(settings),
    "x-content-type-options": "nosniff",
    // Links in mails hold keys: no other site may see the address somebody came from.
    "referrer-policy": "same-origin",
    "x-frame-options": "DENY",
    "cross-origin-opener-policy": "same-origin",
    "permissions-policy":
      "accelerometer=(), camera=(), display-capture=(), geolocation=(), gyroscope=(), magnetometer=(), microphone=(), payment=(), usb=()",
    ...(settings.isHttps ? { "strict-transport-security": HSTS } : {}),
  };
}
