/** A message in plain text. */
export type Message = { readonly subject: string; readonly body: string };

const SIGNATURE = "Trimwake\nA log of the water. It is neither a navigation aid nor a safety service.";

const letter = (subject: string, paragraphs: readonly string[]): Message => ({
  subject,
  body: `${["Hello,", ...paragraphs, SIGNATURE].join("\n\n")}\n`,
});

/*
 * No message repeats what somebody typed into a form: whoever types a stranger's address must not be able to
 * write that stranger a letter.
 */

/** Asks a new account, or a changed address, to show that the mailbox is theirs. */
export function confirmMessage(origin: string, token: string): Message {
  return letter("Confirm your e-mail address for Trimwake", [
    "This address was given for an account on Trimwake. Open this link and press the button there to confirm it:",
    `${origin}/confirm?token=${token}`,
    "The link works once and for 24 hours. If it was not you, leave it: an address nobody confirms gets no further mail.",
  ]);
}

/** What an address that already has an account gets when somebody signs up with it again. */
export function alreadyHereMessage(origin: string): Message {
  return letter("You already have an account on Trimwake", [
    "Somebody, probably you, wanted to make an account with this address. There is one already, and it was not changed.",
    `Sign in: ${origin}/sign-in`,
    `Forgotten the password? Ask for a link to set a new one: ${origin}/forgotten-password`,
  ]);
}

/** The link to set a new password. */
export function resetMessage(origin: string, token: string): Message {
  return letter("Set a new password for Trimwake", [
    "Somebody, probably you, asked to set a new password for the account with this address. Open this link to choose one:",
    `${origin}/reset?token=${token}`,
    "The link works once and for 1 hour. If it was not you, leave it: your password stays as it is.",
  ]);
}

/** Tells the owner of a change they should know of. */
export function passwordChangedMessage(origin: string): Message {
  return letter("Your password for Trimwake was changed", [
    "The password of your account was changed just now.",
    `If it was not you, set a new one at once: ${origin}/forgotten-password`,
  ]);
}

/** Goes to the old address when a new one was confirmed. */
export function addressChangedMessage(): Message {
  return letter("Your account on Trimwake has a new e-mail address", [
    "The e-mail address of your account was changed, and mail goes to the new one from now on.",
    "If it was not you, write to the people who run this site: somebody knows your password.",
  ]);
}
