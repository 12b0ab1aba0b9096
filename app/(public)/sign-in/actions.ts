"use server";

import { redirect } from "next/navigation";
import type { FormState } from "@/lib/display/form-state";
import { signIn } from "@/lib/server/accounts/sign-in";
import { formAction } from "@/lib/server/adapter/form-state";
import { formText } from "@/lib/server/adapter/form-text";
import { requestContext } from "@/lib/server/adapter/request-context";
import { requestDevice } from "@/lib/server/adapter/request-device";
import { localPath } from "@/lib/server/auth/local-path";
import { setSessionCookie } from "@/lib/server/auth/session-cookie";

/** Signs in and goes on to where the person wanted to be. */
export async function signInAction(_: FormState, form: FormData): Promise<FormState> {
  return formAction(form, async () => {
    const input = { email: formText(form, "email"), password: formText(form, "password") };
    const { token } = await signIn(await requestContext(), input, await requestDevice());
    await setSessionCookie(token);
    redirect(localPath(formText(form, "next")));
  });
}
