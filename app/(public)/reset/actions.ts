"use server";

import { redirect } from "next/navigation";
import type { FormState } from "@/lib/display/form-state";
import { resetPassword } from "@/lib/server/accounts/reset-password";
import { formAction } from "@/lib/server/adapter/form-state";
import { formText } from "@/lib/server/adapter/form-text";
import { requestContext } from "@/lib/server/adapter/request-context";
import { requestDevice } from "@/lib/server/adapter/request-device";
import { setSessionCookie } from "@/lib/server/auth/session-cookie";

/** Sets a new password by the link and signs in with it. */
export async function resetPasswordAction(_: FormState, form: FormData): Promise<FormState> {
  return formAction(form, async () => {
    const input = { token: formText(form, "token"), password: formText(form, "password") };
    const { token } = await resetPassword(await requestContext(), input, await requestDevice());
    await setSessionCookie(token);
    redirect("/sessions");
  });
}
