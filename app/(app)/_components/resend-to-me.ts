"use server";

import type { FormState } from "@/lib/display/form-state";
import { resendConfirmation } from "@/lib/server/accounts/resend-confirmation";
import { formAction } from "@/lib/server/adapter/form-state";
import { requestContext } from "@/lib/server/adapter/request-context";
import { requireUser } from "@/lib/server/auth/current-user";

/** Sends the confirmation link again to the person who is signed in. */
export async function resendToMeAction(_: FormState, form: FormData): Promise<FormState> {
  return formAction(form, async () => {
    const { email } = await requireUser("/sessions");
    await resendConfirmation(await requestContext(), { email });
    return "A new link is on its way.";
  });
}
