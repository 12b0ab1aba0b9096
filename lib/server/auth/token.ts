import { createHash, randomBytes } from "node:crypto";

/** A random bearer token of 256 bits for a cookie or a link. */
export function newToken(): string {
  return randomBytes(32).toString("base64url");
}

/** What the database keeps of a token. */
export function tokenHash(token: string): string {
  return createHash("sha256").update(token).digest("hex");
}
