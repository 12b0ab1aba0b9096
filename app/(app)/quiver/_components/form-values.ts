import { withUnit } from "@/lib/display/format-number";
import { DIMENSION_FIELDS, PART_KINDS } from "@/lib/gear/dimension-fields";
import { SETUP_PART_COLUMNS } from "@/lib/gear/part-schema";
import type { getPart, getSetup, listParts } from "@/lib/server/gear/read-gear";
import type { PartChoices } from "./setup-form";

type Part = Awaited<ReturnType<typeof getPart>>;
type Setup = Awaited<ReturnType<typeof getSetup>>;

/** A number as it is typed: no grouping, no needless zeros, safe against the rounding of unit conversion. */
const typed = (value: number): string => String(Number(value.toPrecision(10)));

/** A stored part as form values in the units makers print. */
export function partValues(part: Part): Record<string, string> {
  const values: Record<string, string> = { maker: part.maker, model: part.model, notes: part.notes };
  for (const field of DIMENSION_FIELDS[part.kind]) {
    const value = part.dimensions[field.key];
    if (value === null || value === undefined) continue;
    values[field.key] = field.type === "number" ? typed(Number(value) / field.toSi) : String(value);
  }
  return values;
}

/** A stored setup as form values. */
export function setupValues(setup: Setup): Record<string, string> {
  const values: Record<string, string> = { name: setup.name, notes: setup.notes };
  for (const [column] of SETUP_PART_COLUMNS) values[column] = setup[column] ?? "";
  if (setup.mastPositionMm !== null) values.mastPositionMm = typed(setup.mastPositionMm);
  if (setup.shimStackDeg !== 0) values.shimStackDeg = typed(setup.shimStackDeg);
  return values;
}

/** The parts that can be chosen per kind: those in use, and retired ones the setup already has. */
export function partChoices(
  parts: Awaited<ReturnType<typeof listParts>>,
  keep: readonly string[],
): PartChoices {
  const usable = parts.filter((part) => part.retiredAtMs === null || keep.includes(part.id));
  const of = (kind: Part["kind"]) =>
    usable
      .filter((part) => part.kind === kind)
      .map((part) => ({ value: part.id, label: `${part.maker} ${part.model}` }));
  return Object.fromEntries(PART_KINDS.map((kind) => [kind, of(kind)])) as unknown as PartChoices;
}

/** The two or three dimensions that tell parts of a kind apart, in words. */
export function partSummary(part: Part): string {
  const shown = DIMENSION_FIELDS[part.kind].filter((field) => field.type === "number").slice(0, 3);
  return shown
    .flatMap((field) => {
      const value = part.dimensions[field.key];
      if (typeof value !== "number") return [];
      const printed = String(Number((value / field.toSi).toFixed(2)));
      return [`${field.label.toLowerCase()} ${withUnit(printed, field.unit)}`];
    })
    .join(", ");
}
