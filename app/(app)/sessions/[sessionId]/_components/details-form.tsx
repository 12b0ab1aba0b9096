"use client";

import { NumberField, SelectField, TextAreaField, TextField } from "@/components/ui/fields";
import { FieldSet } from "@/components/ui/field-set";
import { RadioGroup } from "@/components/ui/radio-group";
import { SubmitButton } from "@/components/ui/submit-button";
import type { SpeedUnit } from "@/lib/units/speed";
import { PanelForm, type PanelProps } from "./panel-form";

const DISCIPLINES = [
  { value: "downwind", label: "Downwind" },
  { value: "wing", label: "Wing" },
  { value: "other", label: "Other" },
];
const WATERS = [
  { value: "sea", label: "Open sea" },
  { value: "bay", label: "Bay or fjord" },
  { value: "lake", label: "Lake" },
  { value: "river", label: "River" },
];

/** Title, spot, discipline, the day's wind and waves, notes. */
export function DetailsForm({ speedUnit, ...panel }: PanelProps & { speedUnit: SpeedUnit }) {
  return (
    <PanelForm
      {...panel}
      summary="Details and conditions"
      buttons={<SubmitButton busyText="Saving">Save details</SubmitButton>}
    >
      {({ values, errorOf }) => {
        const wired = (name: string) => ({ name, defaultValue: values[name], error: errorOf(name) });
        return (
          <>
            <div className="grid gap-6 sm:grid-cols-2">
              <TextField
                {...wired("title")}
                label="Title"
                hint="Left empty, it is made from place names."
                optional
                maxLength={120}
              />
              <TextField
                {...wired("spot")}
                label="Spot"
                hint="The stretch of water, to filter by."
                optional
                maxLength={80}
              />
            </div>
            <RadioGroup
              {...wired("discipline")}
              legend="Discipline"
              hint="Another one works every figure out again."
              options={DISCIPLINES}
              inline
            />
            <FieldSet legend="Conditions" hint="As you met them on the water; all optional.">
              <div className="grid items-end gap-6 sm:grid-cols-2">
                <TextField
                  {...wired("windFromDeg")}
                  label="Wind from"
                  hint="Degrees, or a compass point such as WSW."
                  autoComplete="off"
                />
                <NumberField {...wired("windSpeedMps")} label="Wind speed" unit={speedUnit} />
                <NumberField {...wired("wavePeriodS")} label="Wave period" unit="s" />
                <NumberField {...wired("waveHeightM")} label="Wave height" unit="m" />
                <SelectField {...wired("water")} label="Water" empty="Not said" options={WATERS} />
              </div>
            </FieldSet>
            <TextAreaField {...wired("notes")} label="Notes" optional rows={4} maxLength={10_000} />
          </>
        );
      }}
    </PanelForm>
  );
}
