"use client";

import { useActionState } from "react";
import { FormProblems } from "@/components/ui/form-problems";
import { RadioGroup } from "@/components/ui/radio-group";
import { SubmitButton } from "@/components/ui/submit-button";
import { IDLE_FORM, type FormState } from "@/lib/display/form-state";

type Act = (state: FormState, form: FormData) => Promise<FormState>;

const SPEEDS = [
  { value: "kn", label: "Knots, kn" },
  { value: "km/h", label: "Kilometres an hour, km/h" },
  { value: "mph", label: "Miles an hour, mph" },
  { value: "m/s", label: "Metres a second, m/s" },
];
const DISTANCES = [
  { value: "km", label: "Kilometres, km" },
  { value: "NM", label: "Nautical miles, NM" },
  { value: "mi", label: "Miles, mi" },
];

export function UnitsForm({ act, speed, distance }: { act: Act; speed: string; distance: string }) {
  const [state, action] = useActionState(act, IDLE_FORM);
  return (
    <form action={action} noValidate className="flex max-w-xl flex-col gap-6">
      <FormProblems state={state} title="Settings" />
      {/* The reset after an action goes back to what was drawn first, so a saved choice draws anew. */}
      <div key={`${speed} ${distance}`} className="grid gap-6 sm:grid-cols-2">
        <RadioGroup
          name="speed"
          legend="Speeds"
          options={SPEEDS}
          defaultValue={speed}
          error={state.fields.speed}
        />
        <RadioGroup
          name="distance"
          legend="Distances"
          options={DISTANCES}
          defaultValue={distance}
          error={state.fields.distance}
        />
      </div>
      <SubmitButton busyText="Saving" className="self-start">
        Save units
      </SubmitButton>
    </form>
  );
}
