/** The kinds of part that can be bolted together. */
export const PART_KINDS = [
  "front_wing",
  "rear_wing",
  "fuselage",
  "mast",
  "board",
  "hand_wing",
  "shim_set",
] as const;

export type PartKind = (typeof PART_KINDS)[number];

/** What a kind of part is called on screen. */
export const PART_KIND_NAMES: Readonly<Record<PartKind, string>> = {
  front_wing: "Front wing",
  rear_wing: "Rear wing",
  fuselage: "Fuselage",
  mast: "Mast",
  board: "Board",
  hand_wing: "Hand wing",
  shim_set: "Shim set",
};

/**
 * A dimension as makers print it and as it is kept. Kept value (SI) = printed value x `toSi`.
 * `min` and `max` bound the printed value; they are wide on purpose and only catch slips of unit.
 */
export type NumberField = {
  readonly type: "number";
  readonly key: string;
  readonly label: string;
  readonly unit: string;
  readonly toSi: number;
  readonly min: number;
  readonly max: number;
  readonly hint?: string;
};

export type ChoiceField = {
  readonly type: "choice";
  readonly key: string;
  readonly label: string;
  readonly choices: readonly { readonly value: string; readonly label: string }[];
};

export type DimensionField = NumberField | ChoiceField;

const number = (
  key: string,
  label: string,
  unit: string,
  [toSi, min, max, hint]: readonly [toSi: number, min: number, max: number, hint?: string],
): NumberField => ({ type: "number", key, label, unit, toSi, min, max, hint });

const outline: ChoiceField = {
  type: "choice",
  key: "outline",
  label: "Outline",
  choices: [
    { value: "elliptical", label: "Elliptical" },
    { value: "tapered", label: "Tapered" },
    { value: "rectangular", label: "Rectangular" },
  ],
};

const wing = (areaMax: number): readonly DimensionField[] => [
  number("areaM2", "Area", "cm²", [1e-4, 50, areaMax, "Projected area as the maker prints it."]),
  number("spanM", "Span", "mm", [1e-3, 150, 2000]),
  number("rootChordM", "Root chord", "mm", [1e-3, 20, 400]),
  number("thicknessShare", "Section thickness", "%", [1e-2, 4, 25, "Share of the chord."]),
  outline,
  number("angleDeg", "Own angle", "°", [1, -10, 10, "Angle built into the part, against the fuselage."]),
];

/**
 * The dimensions asked for per kind of part: what the drawing and the figures of a setup need.
 * All are optional but those named in `REQUIRED_DIMENSIONS`.
 */
export const DIMENSION_FIELDS: Readonly<Record<PartKind, readonly DimensionField[]>> = {
  front_wing: wing(4000),
  rear_wing: wing(1000),
  fuselage: [
    number("lengthM", "Length", "mm", [1e-3, 300, 1200, "Front wing to rear wing, bolt to bolt."]),
    number("mastReferenceM", "Mast reference", "mm", [
      1e-3,
      0,
      800,
      "From the front wing back to mast position 0.",
    ]),
    number("baseAngleDeg", "Base angle difference", "°", [
      1,
      -5,
      8,
      "Usually 2.5° unless the maker says otherwise.",
    ]),
  ],
  mast: [
    number("lengthM", "Length", "mm", [1e-3, 400, 1300]),
    number("chordM", "Chord", "mm", [1e-3, 60, 250]),
    {
      type: "choice",
      key: "material",
      label: "Material",
      choices: [
        { value: "carbon", label: "Carbon" },
        { value: "aluminium", label: "Aluminium" },
        { value: "other", label: "Other" },
      ],
    },
  ],
  board: [
    number("lengthM", "Length", "cm", [1e-2, 80, 400]),
    number("widthM", "Width", "cm", [1e-2, 30, 100]),
    number("volumeM3", "Volume", "L", [1e-3, 10, 250]),
  ],
  hand_wing: [number("areaM2", "Area", "m²", [1, 1, 10])],
  shim_set: [
    number("smallestStepDeg", "Smallest step", "°", [1, 0.05, 2]),
    number("largestStackDeg", "Largest stack", "°", [1, 0.25, 5]),
  ],
};

/** Dimensions without which a part of the kind says nothing about how it rides. */
export const REQUIRED_DIMENSIONS: Readonly<Record<PartKind, readonly string[]>> = {
  front_wing: ["areaM2", "spanM"],
  rear_wing: ["areaM2", "spanM"],
  fuselage: ["lengthM"],
  mast: ["lengthM"],
  board: [],
  hand_wing: ["areaM2"],
  shim_set: [],
};
