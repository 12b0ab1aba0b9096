"use client";

import { useActionState } from "react";
import { ErrorSummary } from "@/components/ui/error-summary";
import { NumberField, SelectField, TextAreaField, TextField } from "@/components/ui/fields";
import { LinkButton } from "@/components/ui/link-button";
import { SubmitButton } from "@/components/ui/submit-button";
import { formErrors, IDLE_FORM, type FormState } from "@/lib/display/form-state";
import {
  DIMENSION_FIELDS,
  PART_KIND_NAMES,
  REQUIRED_DIMENSIONS,
  type DimensionField,
  type PartKind,
} from "@/lib/gear/dimension-fields";

type Save = (state: FormState, form: FormData) => Promise<FormState>;

/** Adds or changes one part; dimensions in the units makers print. */
export function PartForm(props: {
  kind: PartKind;
  partId?: string;
  initial: Readonly<Record<string, string>>;
  save: Save;
}) {
  const { kind, partId, initial, save } = props;
  const [state, action] = useActionState(save, IDLE_FORM);
  const values = state.status === "error" ? state.values : initial;
  return (
    <form action={action} noValidate className="flex max-w-2xl flex-col gap-6">
      {state.status === "error" && (
        <title>{`Error: ${partId === undefined ? "New part" : PART_KIND_NAMES[kind]} - Trimwake`}</title>
      )}
      <ErrorSummary errors={formErrors(state)} />
      <input type="hidden" name="kind" value={kind} />
      {partId !== undefined && <input type="hidden" name="partId" value={partId} />}
      <div className="grid gap-6 sm:grid-cols-2">
        <TextField name="maker" label="Maker" defaultValue={values.maker} error={state.fields.maker} />
        <TextField name="model" label="Model" defaultValue={values.model} error={state.fields.model} />
      </div>
      <div className="grid gap-6 sm:grid-cols-2">
        {DIMENSION_FIELDS[kind].map((field) => (
          <Dimension
            key={field.key}
            field={field}
            value={values[field.key] ?? ""}
            required={REQUIRED_DIMENSIONS[kind].includes(field.key)}
            error={state.fields[field.key]}
          />
        ))}
      </div>
      <TextAreaField
        name="notes"
        label="Notes"
        optional
        rows={3}
        defaultValue={values.notes}
        error={state.fields.notes}
      />
      <div className="flex flex-wrap gap-3">
        <SubmitButton busyText="Saving">{partId === undefined ? "Add to the quiver" : "Save"}</SubmitButton>
        <LinkButton href="/quiver" look="quiet">
          Back to the quiver
        </LinkButton>
      </div>
    </form>
  );
}

function Dimension(props: { field: DimensionField; value: string; required: boolean; error?: string }) {
  const { field, value, required, error } = props;
  if (field.type === "choice") {
    return (
      <SelectField
        name={field.key}
        label={field.label}
        optional
        empty="Not known"
        options={field.choices}
        defaultValue={value}
        error={error}
      />
    );
  }
  return (
    <NumberField
      name={field.key}
      label={field.label}
      unit={field.unit}
      hint={field.hint}
      optional={!required}
      defaultValue={value}
      error={error}
    />
  );
}
