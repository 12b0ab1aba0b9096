import { z } from "zod";
import {
  DIMENSION_FIELDS,
  PART_KINDS,
  REQUIRED_DIMENSIONS,
  type DimensionField,
  type PartKind,
} from "./dimension-fields";

const text = (max: number) => z.string().trim().max(max, `Keep it to ${max} characters.`);

function fieldSchema(field: DimensionField, required: boolean) {
  if (field.type === "choice") {
    return z
      .enum(field.choices.map((choice) => choice.value) as [string, ...string[]], {
        error: `Choose one of the ${field.label.toLowerCase()} choices.`,
      })
      .nullable();
  }
  const range = `${field.label} must be between ${field.min} and ${field.max} ${field.unit}.`;
  const slack = 1e-9;
  const number = z
    .number({ error: required ? `Enter the ${field.label.toLowerCase()} in ${field.unit}.` : range })
    .min(field.min * field.toSi - slack, range)
    .max(field.max * field.toSi + slack, range);
  return required ? number : number.nullable();
}

function dimensionsSchema(kind: PartKind) {
  const required = REQUIRED_DIMENSIONS[kind];
  return z.strictObject(
    Object.fromEntries(
      DIMENSION_FIELDS[kind].map((field) => {
        const needed = required.includes(field.key);
        const schema = fieldSchema(field, needed);
        return [field.key, needed ? schema : schema.optional()];
      }),
    ),
  );
}

const common = {
  maker: text(60).min(1, "Enter the maker, or “own make”."),
  model: text(80).min(1, "Enter the model."),
  notes: text(2000).default(""),
};

/** A part as entered, dimensions in SI units under the keys of `DIMENSION_FIELDS`; unknown keys are refused. */
export const partSchema = z.discriminatedUnion(
  "kind",
  PART_KINDS.map((kind) =>
    z.strictObject({ kind: z.literal(kind), ...common, dimensions: dimensionsSchema(kind) }),
  ) as unknown as readonly [
    z.ZodObject<{
      kind: z.ZodLiteral<PartKind>;
      maker: z.ZodString;
      model: z.ZodString;
      notes: z.ZodDefault<z.ZodString>;
      dimensions: z.ZodType<Record<string, number | string | null>>;
    }>,
  ],
);

export type PartInput = z.infer<typeof partSchema>;

const partId = z.string().min(1).max(40).nullable().default(null);

/** A setup as entered: which parts, where the mast stands, how much shim. A setup needs a front wing at least. */
export const setupSchema = z.strictObject({
  name: text(80).min(1, "Give the setup a name you will know it by."),
  frontWingId: z.string({ error: "Choose the front wing." }).min(1, "Choose the front wing.").max(40),
  rearWingId: partId,
  fuselageId: partId,
  mastId: partId,
  boardId: partId,
  handWingId: partId,
  shimSetId: partId,
  mastPositionMm: z
    .number({ error: "Enter the mast position as a number of millimetres." })
    .min(-300, "The mast position must be between -300 and 300 mm.")
    .max(300, "The mast position must be between -300 and 300 mm.")
    .nullable()
    .default(null),
  shimStackDeg: z
    .number({ error: "Enter the shim as degrees, such as 0.5 or -0.25." })
    .min(-5, "The shim stack must be between -5° and +5°.")
    .max(5, "The shim stack must be between -5° and +5°.")
    .default(0),
  notes: text(2000).default(""),
});

export type SetupInput = z.infer<typeof setupSchema>;

/** The columns of a setup that hold a part, with the kind each must be. */
export const SETUP_PART_COLUMNS = [
  ["frontWingId", "front_wing"],
  ["rearWingId", "rear_wing"],
  ["fuselageId", "fuselage"],
  ["mastId", "mast"],
  ["boardId", "board"],
  ["handWingId", "hand_wing"],
  ["shimSetId", "shim_set"],
] as const satisfies readonly (readonly [keyof SetupInput, PartKind])[];
