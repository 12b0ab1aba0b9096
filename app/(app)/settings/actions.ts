"use server";

import { revalidatePath } from "next/cache";
import { cookies } from "next/headers";
import { redirect } from "next/navigation";
import type { FormState } from "@/lib/display/form-state";
import { changeEmail } from "@/lib/server/accounts/change-email";
import { changePassword } from "@/lib/server/accounts/change-password";
import { endOtherSignIns } from "@/lib/server/accounts/end-other-sign-ins";
import { endSignIn } from "@/lib/server/accounts/end-sign-in";
import { updateProfile } from "@/lib/server/accounts/update-profile";
import { updateTheme } from "@/lib/server/accounts/update-theme";
import { updateUnits } from "@/lib/server/accounts/update-units";
import { formAction } from "@/lib/server/adapter/form-state";
import { formText } from "@/lib/server/adapter/form-text";
import { requestContext } from "@/lib/server/adapter/request-context";
import { requestDevice } from "@/lib/server/adapter/request-device";
import { setSessionCookie } from "@/lib/server/auth/session-cookie";

export async function updateProfileAction(_: FormState, form: FormData): Promise<FormState> {
  return formAction(form, async () => {
    const input = { name: formText(form, "name"), weight: formText(form, "weight") };
    await updateProfile(await requestContext(), input);
    revalidatePath("/", "layout");
    return "Name and weight are saved.";
  });
}

export async function updateUnitsAction(_: FormState, form: FormData): Promise<FormState> {
  return formAction(form, async () => {
    const input = { speed: formText(form, "speed"), distance: formText(form, "distance") };
    await updateUnits(await requestContext(), input);
    revalidatePath("/", "layout");
    return "Units are saved. Every page uses them from now on.";
  });
}

/** Keeps the choice with the account, and here at once for a browser that runs no scripts. */
export async function updateThemeAction(_: FormState, form: FormData): Promise<FormState> {
  return formAction(form, async () => {
    const theme = formText(form, "theme");
    await updateTheme(await requestContext(), { theme });
    (await cookies()).set("theme", theme, { path: "/", maxAge: 31_536_000, sameSite: "lax", secure: true });
    return "Colours are saved. Devices where you choose nothing else follow.";
  });
}

export async function changeEmailAction(_: FormState, form: FormData): Promise<FormState> {
  return formAction(form, async () => {
    await changeEmail(await requestContext(), {
      email: formText(form, "email"),
      currentPassword: formText(form, "currentPassword"),
    });
    return "A message is on its way to the new address. The change takes effect when you use its link.";
  });
}

export async function changePasswordAction(_: FormState, form: FormData): Promise<FormState> {
  return formAction(form, async () => {
    const input = {
      currentPassword: formText(form, "currentPassword"),
      newPassword: formText(form, "newPassword"),
      endOthers: form.has("endOthers"),
    };
    const { token, ended } = await changePassword(await requestContext(), input, await requestDevice());
    await setSessionCookie(token);
    return ended === 0
      ? "Your password is changed."
      : `Your password is changed, and ${ended === 1 ? "1 other sign-in has" : `${ended} other sign-ins have`} ended.`;
  });
}

export async function endSignInAction(_: FormState, form: FormData): Promise<FormState> {
  return formAction(form, async () => {
    await endSignIn(await requestContext(), { id: formText(form, "id") });
    redirect("/settings/sign-ins?done=one");
  });
}

export async function endOtherSignInsAction(_: FormState, form: FormData): Promise<FormState> {
  return formAction(form, async () => {
    const ended = await endOtherSignIns(await requestContext());
    redirect(`/settings/sign-ins?done=${ended === 0 ? "none" : "others"}`);
  });
}
