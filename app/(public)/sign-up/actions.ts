"use server";

import { redirect } from "next/navigation";
import type { FormState } from "@/lib/display/form-state";
import { signUp } from "@/lib/server/accounts/sign-up";
import { formAction } from "@/lib/server/adapter/form-state";
import { formText } from "@/lib/server/adapter/form-text";
import { requestContext } from "@/lib/server/adapter/request-context";

/** Makes an account. What follows is the same page for a known address, so nobody can find out who is here. */
export async function signUpAction(_: FormState, form: FormData): Promise<FormState> {
  return formAction(form, async () => {
    await signUp(await requestContext(), {
      email: formText(form, "email"),
      password: formText(form, "password"),
      name: formText(form, "name"),
      weight: formText(form, "weight"),
    });
    redirect("/check-your-mail");
  });
}
