import { DateField, NumberField, SelectField } from "@/components/ui/fields";

export type Choice = { readonly value: string; readonly label: string };

/** What the log and the comparison can be narrowed by; names are those of the URL. */
export type FilterChoices = {
  readonly frontWings: readonly Choice[];
  readonly parts: readonly Choice[];
  readonly setups: readonly Choice[];
  readonly spots: readonly string[];
};

const DISCIPLINES: readonly Choice[] = [
  { value: "downwind", label: "Downwind" },
  { value: "wing", label: "Wing" },
  { value: "other", label: "Other" },
];

const QUALITIES: readonly Choice[] = [
  { value: "A", label: "A only" },
  { value: "B", label: "B or better" },
  { value: "C", label: "C or better" },
];

/** The fields of the filter form, filled from the URL; an empty field narrows nothing. */
export function FilterFields(props: {
  values: Readonly<Record<string, string | number | undefined>>;
  choices: FilterChoices;
}) {
  const { values, choices } = props;
  const select = (name: string, label: string, empty: string, options: readonly Choice[]) => (
    <SelectField
      name={name}
      label={label}
      empty={empty}
      options={options}
      defaultValue={values[name] ?? ""}
    />
  );
  return (
    <div className="grid grid-cols-1 gap-4 sm:grid-cols-2 lg:grid-cols-5">
      {select("frontWing", "Front wing", "Any", choices.frontWings)}
      {select("part", "Any part", "Any", choices.parts)}
      {select("setup", "Setup", "Any", choices.setups)}
      {select("discipline", "Discipline", "Any", DISCIPLINES)}
      {select(
        "spot",
        "Spot",
        "Any",
        choices.spots.map((spot) => ({ value: spot, label: spot })),
      )}
      <DateField name="from" label="From" defaultValue={values.from} />
      <DateField name="to" label="To" defaultValue={values.to} />
      <NumberField name="windMin" label="Wind from" unit="kn" defaultValue={values.windMin} />
      <NumberField name="windMax" label="Wind up to" unit="kn" defaultValue={values.windMax} />
      {select("quality", "Quality", "Any", QUALITIES)}
    </div>
  );
}
