"use server";

import { notFound, redirect } from "next/navigation";
import { revalidatePath } from "next/cache";
import type { FormState } from "@/lib/display/form-state";
import { parseDecimal } from "@/lib/display/parse-decimal";
import { DIMENSION_FIELDS, PART_KINDS, type PartKind } from "@/lib/gear/dimension-fields";
import { SETUP_PART_COLUMNS } from "@/lib/gear/part-schema";
import { formAction } from "@/lib/server/adapter/form-state";
import { pageRead } from "@/lib/server/adapter/page";
import { requestContext } from "@/lib/server/adapter/request-context";
import { createPart, retirePart, updatePart } from "@/lib/server/gear/save-part";
import { createSetup, retireSetup, updateSetup } from "@/lib/server/gear/save-setup";

const textOf = (form: FormData, name: string): string => {
  const value = form.get(name);
  return typeof value === "string" ? value.trim() : "";
};

/** The typed number in SI, null when left empty, the text itself when it is no number (the verb refuses it). */
function numberOf(form: FormData, name: string, unit: string, toSi = 1): number | string | null {
  const text = textOf(form, name);
  if (text === "") return null;
  const value = parseDecimal(text, unit);
  return value === null ? text : value * toSi;
}

function kindOf(form: FormData): PartKind | "" {
  return PART_KINDS.find((kind) => kind === textOf(form, "kind")) ?? "";
}

function partInput(form: FormData) {
  const kind = kindOf(form);
  const fields = kind === "" ? [] : DIMENSION_FIELDS[kind];
  const dimensions = Object.fromEntries(
    fields.map((field) => [
      field.key,
      field.type === "number"
        ? numberOf(form, field.key, field.unit, field.toSi)
        : textOf(form, field.key) || null,
    ]),
  );
  return {
    kind,
    maker: textOf(form, "maker"),
    model: textOf(form, "model"),
    notes: textOf(form, "notes"),
    dimensions,
  };
}

/** Adds a part, or changes the one named by the form's `partId`. */
export async function savePartAction(_: FormState, form: FormData): Promise<FormState> {
  return formAction(form, async () => {
    const ctx = await requestContext();
    const partId = textOf(form, "partId");
    if (partId === "") await createPart(ctx, partInput(form));
    else await updatePart(ctx, partId, partInput(form));
    revalidatePath("/quiver");
    redirect("/quiver?saved=part");
  });
}

function setupInput(form: FormData) {
  const parts = Object.fromEntries(
    SETUP_PART_COLUMNS.map(([column]) => [column, textOf(form, column) || null]),
  );
  return {
    ...parts,
    name: textOf(form, "name"),
    mastPositionMm: numberOf(form, "mastPositionMm", "mm"),
    shimStackDeg: numberOf(form, "shimStackDeg", "°") ?? 0,
    notes: textOf(form, "notes"),
  };
}

/** Adds a setup (perhaps copied from `copiedFromId`), or changes the one named by the form's `setupId`. */
export async function saveSetupAction(_: FormState, form: FormData): Promise<FormState> {
  return formAction(form, async () => {
    const ctx = await requestContext();
    const setupId = textOf(form, "setupId");
    if (setupId === "") await createSetup(ctx, setupInput(form), textOf(form, "copiedFromId") || null);
    else await updateSetup(ctx, setupId, setupInput(form));
    revalidatePath("/quiver");
    redirect("/quiver?saved=setup");
  });
}

/** Takes a part out of use (`retired` = 1) or back into it. */
export async function retirePartAction(form: FormData): Promise<void> {
  if (!(form instanceof FormData)) notFound();
  const retired = textOf(form, "retired") === "1";
  await pageRead("/quiver", async () => retirePart(await requestContext(), textOf(form, "partId"), retired));
  revalidatePath("/quiver");
  redirect(`/quiver?saved=${retired ? "part-retired" : "part"}`);
}

/** Takes a setup out of use (`retired` = 1) or back into it. */
export async function retireSetupAction(form: FormData): Promise<void> {
  if (!(form instanceof FormData)) notFound();
  const retired = textOf(form, "retired") === "1";
  await pageRead("/quiver", async () =>
    retireSetup(await requestContext(), textOf(form, "setupId"), retired),
  );
  revalidatePath("/quiver");
  redirect(`/quiver?saved=${retired ? "setup-retired" : "setup"}`);
}
