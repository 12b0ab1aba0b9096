import { z } from "zod";
import { parseDecimal } from "@/lib/display/parse-decimal";
import { passwordProblem } from "@/lib/server/auth/password-rules";

/** Long enough for 128 characters of any kind; longer input is not worth hashing. */
const PASSWORD_INPUT_MAX = 2000;
/** RFC 5321, 4.5.3.1.3: a path holds 256 octets, two of which are the angle brackets. */
const EMAIL_MAX = 254;

/** Weight with gear on, kilograms: wide enough for children and for a heavy rider in winter gear. */
export const WEIGHT_KG_MIN = 20;
export const WEIGHT_KG_MAX = 250;

/** Pasted addresses bring spaces, "mailto:" and characters that cannot be seen. */
const tidyEmail = (text: string): string =>
  text
    .replace(/[\s\u200b-\u200f\u202a-\u202e\u2060\ufeff]/g, "")
    .replace(/^mailto:/i, "")
    .toLowerCase();

const EMAIL_TEXT = "Enter an e-mail address such as name@example.org.";

export const emailField = z
  .string({ error: EMAIL_TEXT })
  .max(1000, { error: EMAIL_TEXT })
  .transform(tidyEmail)
  .pipe(z.email({ error: EMAIL_TEXT }).max(EMAIL_MAX, { error: EMAIL_TEXT }));

/** A password as typed, not yet judged: sign-in must not tell what the rules are. */
export const passwordField = z
  .string({ error: "Enter your password." })
  .min(1, { error: "Enter your password." })
  .max(PASSWORD_INPUT_MAX, { error: "This is longer than any password here." });

const NOBODY = { email: "", name: "" };

/** A password to be set; whether it is one's own name or address is judged once those are known. */
export const newPasswordField = z
  .string({ error: "Enter a password." })
  .max(PASSWORD_INPUT_MAX, { error: "Use at most 128 characters.", abort: true })
  .superRefine((password, issue) => {
    const problem = passwordProblem(password, NOBODY);
    if (problem !== null) issue.addIssue({ code: "custom", message: problem });
  });

const NAME_TEXT = "Enter your name.";

export const nameField = z
  .string({ error: NAME_TEXT })
  .transform((text) => text.normalize("NFC").replace(/\s+/g, " ").trim())
  .pipe(
    z
      .string()
      .min(1, { error: NAME_TEXT })
      .max(80, { error: "Use at most 80 characters for the name." })
      .refine((text) => !/\p{Cc}/u.test(text), { error: NAME_TEXT }),
  );

const WEIGHT_TEXT = `Enter the weight with gear in kilograms, between ${WEIGHT_KG_MIN} and ${WEIGHT_KG_MAX}, or leave it empty.`;

/** "82", "82,5", "82.5 kg" or nothing. */
export const weightField = z
  .string({ error: WEIGHT_TEXT })
  .max(40, { error: WEIGHT_TEXT })
  .optional()
  .transform((text, issue): number | null => {
    if (text === undefined || text.trim() === "") return null;
    const value = parseDecimal(text, "kg");
    if (value !== null && value >= WEIGHT_KG_MIN && value <= WEIGHT_KG_MAX) return value;
    issue.addIssue({ code: "custom", message: WEIGHT_TEXT });
    return z.NEVER;
  });

export const tokenField = z.string().regex(/^[\w-]{43}$/);
