"use client";

import { TextField } from "@/components/ui/fields";
import { SubmitButton } from "@/components/ui/submit-button";
import { PanelForm, type PanelProps } from "./panel-form";

/** Names where the session began and ended; one name when that is one place. */
export function PlacesForm({ onePlace, ...panel }: PanelProps & { onePlace: boolean }) {
  const { initial } = panel;
  const ends = onePlace
    ? [{ end: "start", label: "Where it began and ended" }]
    : [
        { end: "start", label: "Where it began" },
        { end: "end", label: "Where it ended" },
      ];
  return (
    <PanelForm
      {...panel}
      summary="Places"
      buttons={<SubmitButton busyText="Saving">Save places</SubmitButton>}
    >
      {({ values, errorOf }) => (
        <>
          <p className="text-muted text-sm">
            A name holds for all your sessions that begin or end there, and goes into their titles.
          </p>
          <div className="grid gap-6 sm:grid-cols-2">
            {ends.map(({ end, label }) => (
              <div key={end}>
                <input type="hidden" name={`${end}NameBefore`} value={initial[`${end}Name`] ?? ""} />
                <TextField
                  name={`${end}Name`}
                  label={label}
                  defaultValue={values[`${end}Name`]}
                  error={errorOf(`${end}Name`)}
                  maxLength={60}
                  autoComplete="off"
                />
              </div>
            ))}
          </div>
        </>
      )}
    </PanelForm>
  );
}
