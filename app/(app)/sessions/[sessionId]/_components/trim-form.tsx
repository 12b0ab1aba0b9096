"use client";

import { useState } from "react";
import { TextField } from "@/components/ui/fields";
import { SubmitButton } from "@/components/ui/submit-button";
import { PanelForm, type PanelProps } from "./panel-form";
import type { Stretch } from "@/lib/track/speed-series";
import { StretchButton, type Ends } from "./stretch-button";
import { useBrushedStretch } from "./use-brushed-stretch";

/** Sets both ends of the session by hand; the detected ones come back with one button. */
export function TrimForm(props: PanelProps & { timeZone: string; isTrimmed: boolean }) {
  const { timeZone, isTrimmed, ...panel } = props;
  // Heard here: the fields below draw anew after an answer and would forget it.
  const stretch = useBrushedStretch();
  return (
    <PanelForm
      {...panel}
      summary="Trim the ends"
      buttons={
        <>
          <SubmitButton busyText="Working the figures out">Trim to these ends</SubmitButton>
          {isTrimmed && (
            <SubmitButton look="plain" name="detected" value="1" busyText="Working the figures out">
              Back to the detected ends
            </SubmitButton>
          )}
        </>
      }
    >
      {({ values, errorOf }) => (
        <TrimFields stretch={stretch} values={values} errorOf={errorOf} timeZone={timeZone} />
      )}
    </PanelForm>
  );
}

function TrimFields({
  stretch,
  values,
  errorOf,
  timeZone,
}: {
  stretch: Stretch | null;
  values: Readonly<Record<string, string>>;
  errorOf: (name: string) => string | undefined;
  timeZone: string;
}) {
  const [brushed, setBrushed] = useState<Ends | null>(null);
  const from = brushed?.from ?? values["trimStart"];
  const to = brushed?.to ?? values["trimEnd"];
  return (
    <>
      <p className="text-muted text-sm">
        What lies outside is left out of every figure. The recording itself is kept whole. Times are local, as
        hours, minutes and seconds.
      </p>
      <div key={`${from} ${to}`} className="grid grid-cols-2 items-end gap-6">
        <TextField
          name="trimStart"
          label="Start"
          defaultValue={from}
          error={errorOf("trimStart")}
          autoComplete="off"
        />
        <TextField
          name="trimEnd"
          label="End"
          defaultValue={to}
          error={errorOf("trimEnd")}
          autoComplete="off"
        />
      </div>
      <StretchButton stretch={stretch} timeZone={timeZone} what="as both ends" onUse={setBrushed} />
    </>
  );
}
