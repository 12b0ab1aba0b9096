"use server";

import { redirect } from "next/navigation";
import type { FormState } from "@/lib/display/form-state";
import { confirmEmail } from "@/lib/server/accounts/confirm-email";
import { formAction } from "@/lib/server/adapter/form-state";
import { formText } from "@/lib/server/adapter/form-text";
import { requestContext } from "@/lib/server/adapter/request-context";

/** Confirms an address; a press of a button, because programs that scan mail open every link in it. */
export async function confirmEmailAction(_: FormState, form: FormData): Promise<FormState> {
  return formAction(form, async () => {
    const ctx = await requestContext();
    await confirmEmail(ctx, { token: formText(form, "token") });
    redirect(ctx.actor.kind === "user" ? "/settings/email?done=confirmed" : "/sign-in?done=confirmed");
  });
}
