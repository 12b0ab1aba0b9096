"use server";

import type { FormState } from "@/lib/display/form-state";
import { requestPasswordReset } from "@/lib/server/accounts/request-password-reset";
import { resendConfirmation } from "@/lib/server/accounts/resend-confirmation";
import { formAction } from "@/lib/server/adapter/form-state";
import { formText } from "@/lib/server/adapter/form-text";
import { requestContext } from "@/lib/server/adapter/request-context";

/** Sends the link that confirms an address once more. */
export async function resendConfirmationAction(_: FormState, form: FormData): Promise<FormState> {
  return formAction(form, async () => {
    await resendConfirmation(await requestContext(), { email: formText(form, "email") });
    return "If this address has an account that waits to be confirmed, a new link is on its way. Older links no longer work.";
  });
}

/** Sends the link to set a new password. */
export async function requestResetAction(_: FormState, form: FormData): Promise<FormState> {
  return formAction(form, async () => {
    await requestPasswordReset(await requestContext(), { email: formText(form, "email") });
    return "If this address has an account, a link to set a new password is on its way. It works once, for 1 hour.";
  });
}
