import { createHash } from "node:crypto";
import { COMMON_PASSWORD_HASHES } from "./common-password-hashes";
import { normalisePassword } from "./password";

/** OWASP ASVS 5.0, 6.2.1 and 6.2.9: at least 8, and at least 64 must be allowed. */
export const PASSWORD_LENGTH_MIN = 8;
export const PASSWORD_LENGTH_MAX = 128;

const ENTRY_LENGTH = 8;
let common: ReadonlySet<string> | null = null;

function commonHashes(): ReadonlySet<string> {
  if (common === null) {
    const entries = new Set<string>();
    for (let at = 0; at < COMMON_PASSWORD_HASHES.length; at += ENTRY_LENGTH) {
      entries.add(COMMON_PASSWORD_HASHES.slice(at, at + ENTRY_LENGTH));
    }
    common = entries;
  }
  return common;
}

/** Whether a password stands among the most common ones; upper and lower case count as the same. */
export function isCommonPassword(password: string): boolean {
  const digest = createHash("sha256").update(normalisePassword(password).toLowerCase()).digest();
  return commonHashes().has(digest.subarray(0, 6).toString("base64url"));
}

/** How long a password is as people count: in code points, so an emoji is one. */
export function passwordLength(password: string): number {
  return [...normalisePassword(password)].length;
}

/** Words that anybody who knows the account would try first: its address, the name, ours. */
function isGuessable(password: string, about: { email: string; name: string }): boolean {
  const bare = (text: string) => text.toLowerCase().replace(/[^\p{L}\p{N}]/gu, "");
  const typed = bare(normalisePassword(password));
  const withoutDigits = typed.replace(/\d+$/, "");
  const obvious = [about.email, about.email.split("@")[0] ?? "", about.name, "trimwake", "trimwaketrimwake"];
  return obvious
    .map(bare)
    .filter((word) => word.length > 0)
    .some((word) => typed === word || withoutDigits === word);
}

/**
 * What keeps a new password from being taken, as a sentence, or null when it is fine. No rule about kinds of
 * characters: they make passwords worse (OWASP ASVS 5.0, 6.2.5).
 */
export function passwordProblem(password: string, about: { email: string; name: string }): string | null {
  const length = passwordLength(password);
  if (length === 0) return "Enter a password.";
  if (length < PASSWORD_LENGTH_MIN)
    return `Use at least ${PASSWORD_LENGTH_MIN} characters. A few words in a row work well.`;
  if (length > PASSWORD_LENGTH_MAX) return `Use at most ${PASSWORD_LENGTH_MAX} characters.`;
  if (isCommonPassword(password))
    return "This password is among the most common ones and is tried first. Choose another.";
  if (isGuessable(password, about))
    return "This password is your own name, address or the name of this site. Choose another.";
  return null;
}
