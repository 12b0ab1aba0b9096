import { hash, verify } from "@node-rs/argon2";

/** OWASP Password Storage Cheat Sheet: argon2id (the library's default) with 19 MiB, 2 passes, 1 lane. */
const COST = { memoryCost: 19456, timeCost: 2, parallelism: 1 };

/**
 * The hash of a password nobody has, made with the same cost as real ones: checking against it takes as long as
 * checking a real account's, so time does not tell whether an address has an account.
 */
export const NOBODYS_HASH =
  "$argon2id$v=19$m=19456,t=2,p=1$jZFXRXyz29tKKmykdWF/wA$KGtSXyiV18Y0K5okofUaiNXj1tHgNcdr9n1hNK71BR0";

/** One spelling of what was typed (NIST SP 800-63B-4, 3.1.1.2: normalise by NFKC before hashing). */
export function normalisePassword(password: string): string {
  return password.normalize("NFKC");
}

/** Hashes a password for keeping. */
export function hashPassword(password: string): Promise<string> {
  return hash(normalisePassword(password), COST);
}

/**
 * Whether the password belongs to the hash; without a hash it takes the same time and answers no. An account
 * whose stored hash cannot be read has no password that fits.
 */
export async function verifyPassword(passwordHash: string | null, password: string): Promise<boolean> {
  const known = passwordHash?.startsWith("$argon2") ? passwordHash : null;
  const matches = await verify(known ?? NOBODYS_HASH, normalisePassword(password));
  return known !== null && matches;
}

/** Whether a hash was made with less effort than is asked for today. */
export function isWeakHash(passwordHash: string): boolean {
  const found = /^\$argon2id\$v=19\$m=(\d+),t=(\d+),p=(\d+)\$/.exec(passwordHash);
  if (found === null) return true;
  return (
    Number(found[1]) < COST.memoryCost ||
    Number(found[2]) < COST.timeCost ||
    Number(found[3]) < COST.parallelism
  );
}
