"use client";

import { useState } from "react";
import { TextField } from "@/components/ui/fields";
import { SubmitButton } from "@/components/ui/submit-button";
import { PanelForm, type PanelProps } from "./panel-form";
import { StretchButton, type Ends } from "./stretch-button";

/** Sets both ends of the session by hand; the detected ones come back with one button. */
export function TrimForm(props: PanelProps & { timeZone: string; isTrimmed: boolean }) {
  const { timeZone, isTrimmed, ...panel } = props;
  return (
    <PanelForm
      {...panel}
      summary="Trim the ends"
      buttons={
        <>
          <SubmitButton busyText="Working the figures out">Trim to these ends</SubmitButton>
          {isTrimmed && (
            <SubmitButton look="plain" name="reset" value="1" busyText="Working the figures out">
              Back to the detected ends
            </SubmitButton>
          )}
        </>
      }
    >
      {({ values, errorOf }) => <TrimFields values={values} errorOf={errorOf} timeZone={timeZone} />}
    </PanelForm>
  );
}

function TrimFields({
  values,
  errorOf,
  timeZone,
}: {
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
      <div key={`${from} ${to}`} className="grid grid-cols-2 gap-6">
        <TextField
          name="trimStart"
          label="Start"
          defaultValue={from}
          error={errorOf("trimStart")}
          className="num"
          autoComplete="off"
        />
        <TextField
          name="trimEnd"
          label="End"
          defaultValue={to}
          error={errorOf("trimEnd")}
          className="num"
          autoComplete="off"
        />
      </div>
      <StretchButton timeZone={timeZone} what="as both ends" onUse={setBrushed} />
    </>
  );
}
