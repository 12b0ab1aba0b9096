"use client";

import { useActionState } from "react";
import { ErrorSummary } from "@/components/ui/error-summary";
import { NumberField, SelectField, TextAreaField, TextField } from "@/components/ui/fields";
import { LinkButton } from "@/components/ui/link-button";
import { Notice } from "@/components/ui/notice";
import { SubmitButton } from "@/components/ui/submit-button";
import { formErrors, IDLE_FORM, type FormState } from "@/lib/display/form-state";
import { PART_KIND_NAMES, type PartKind } from "@/lib/gear/dimension-fields";
import { SETUP_PART_COLUMNS } from "@/lib/gear/part-schema";

type Save = (state: FormState, form: FormData) => Promise<FormState>;
export type PartChoices = Readonly<Record<PartKind, readonly { value: string; label: string }[]>>;

/** Adds or changes one setup: its parts, where the mast stands, how much shim is under the rear wing. */
export function SetupForm(props: {
  setupId?: string;
  copiedFromId?: string;
  choices: PartChoices;
  initial: Readonly<Record<string, string>>;
  save: Save;
}) {
  const { setupId, copiedFromId, choices, initial, save } = props;
  const [state, action] = useActionState(save, IDLE_FORM);
  const values = state.status === "error" ? state.values : initial;
  return (
    <form action={action} noValidate className="flex max-w-2xl flex-col gap-6">
      {state.status === "error" && (
        <title>{`Error: ${setupId === undefined ? "New setup" : "Setup"} - Trimwake`}</title>
      )}
      <ErrorSummary errors={formErrors(state)} />
      {setupId !== undefined && <input type="hidden" name="setupId" value={setupId} />}
      {copiedFromId !== undefined && <input type="hidden" name="copiedFromId" value={copiedFromId} />}
      <TextField
        name="name"
        label="Name"
        hint="What you would call it on the beach, such as “Long rail, half shim”."
        defaultValue={values.name}
        error={state.fields.name}
      />
      <div className="grid gap-6 sm:grid-cols-2">
        {SETUP_PART_COLUMNS.filter(([, kind]) => kind === "front_wing" || choices[kind].length > 0).map(
          ([column, kind]) => (
            <SelectField
              key={column}
              name={column}
              label={PART_KIND_NAMES[kind]}
              optional={kind !== "front_wing"}
              empty={kind === "front_wing" ? "Choose" : "None, or not noted"}
              options={choices[kind]}
              defaultValue={values[column]}
              error={state.fields[column]}
            />
          ),
        )}
      </div>
      <div className="grid gap-6 sm:grid-cols-2">
        <NumberField
          name="mastPositionMm"
          label="Mast position"
          unit="mm"
          optional
          hint="Forward of the fuselage’s reference; behind it is negative."
          defaultValue={values.mastPositionMm}
          error={state.fields.mastPositionMm}
        />
        <NumberField
          name="shimStackDeg"
          label="Shim under the rear wing"
          unit="°"
          optional
          hint="Sum of the stack. Positive makes the angle difference larger."
          defaultValue={values.shimStackDeg}
          error={state.fields.shimStackDeg}
        />
      </div>
      <TextAreaField
        name="notes"
        label="Notes"
        optional
        rows={3}
        defaultValue={values.notes}
        error={state.fields.notes}
      />
      <Notice kind="caution">
        Change one step at a time, in easy conditions, and follow the maker’s limits and bolt torques.
      </Notice>
      <div className="flex flex-wrap gap-3">
        <SubmitButton busyText="Saving">{setupId === undefined ? "Add setup" : "Save"}</SubmitButton>
        <LinkButton href="/quiver" look="quiet">
          Back to the quiver
        </LinkButton>
      </div>
    </form>
  );
}
