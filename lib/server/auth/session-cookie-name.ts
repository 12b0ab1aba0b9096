/** `__Host-` makes browsers insist on Secure, Path=/ and no Domain (RFC 6265bis, 4.1.3.2). */
export const SESSION_COOKIE = "__Host-trimwake";
