import type { Context } from "@/lib/server/context/context";
import { createPart } from "@/lib/server/gear/save-part";
import { createSetup } from "@/lib/server/gear/save-setup";

/** Invented makers and parts, dimensions in SI; what printed figures such gear would carry. */
const PARTS = {
  front850: {
    kind: "front_wing",
    maker: "Aldervane",
    model: "Long-rail 850",
    dimensions: {
      areaM2: 0.09,
      spanM: 0.85,
      rootChordM: 0.135,
      thicknessShare: 0.12,
      outline: "elliptical",
      angleDeg: 1,
    },
  },
  front780: {
    kind: "front_wing",
    maker: "Aldervane",
    model: "Skim 780",
    dimensions: {
      areaM2: 0.07,
      spanM: 0.92,
      rootChordM: 0.1,
      thicknessShare: 0.11,
      outline: "elliptical",
      angleDeg: 1,
    },
  },
  rear45: {
    kind: "rear_wing",
    maker: "Morrowkeel",
    model: "Rear 45",
    dimensions: {
      areaM2: 0.0128,
      spanM: 0.36,
      rootChordM: 0.045,
      thicknessShare: 0.1,
      outline: "elliptical",
      angleDeg: -1.5,
    },
  },
  rear50: {
    kind: "rear_wing",
    maker: "Morrowkeel",
    model: "Rear 50",
    dimensions: {
      areaM2: 0.0142,
      spanM: 0.36,
      rootChordM: 0.05,
      thicknessShare: 0.1,
      outline: "elliptical",
      angleDeg: -1.5,
    },
  },
  fuselage: {
    kind: "fuselage",
    maker: "Morrowkeel",
    model: "Straight 660",
    dimensions: { lengthM: 0.66, mastReferenceM: 0.18, baseAngleDeg: 2.5 },
  },
  mast: {
    kind: "mast",
    maker: "Saltbrook",
    model: "Spar 82",
    dimensions: { lengthM: 0.82, chordM: 0.12, material: "carbon" },
  },
  board: {
    kind: "board",
    maker: "Saltbrook",
    model: "Drift 7'2\"",
    dimensions: { lengthM: 2.18, widthM: 0.48, volumeM3: 0.11 },
  },
  handWing: { kind: "hand_wing", maker: "Saltbrook", model: "Gale 4", dimensions: { areaM2: 4 } },
  shims: {
    kind: "shim_set",
    maker: "Morrowkeel",
    model: "Shim set",
    dimensions: { smallestStepDeg: 0.25, largestStackDeg: 1.5 },
  },
} as const;

/** Fills a rider's quiver through the verbs; returns setup ids by name. */
export async function makeQuiver(ctx: Context, names: readonly string[]): Promise<Map<string, string>> {
  const ids = new Map<string, string>();
  for (const [key, part] of Object.entries(PARTS)) ids.set(key, (await createPart(ctx, part)).id);
  const part = (key: keyof typeof PARTS) => ids.get(key) ?? null;
  const base = {
    frontWingId: part("front850"),
    rearWingId: part("rear45"),
    fuselageId: part("fuselage"),
    mastId: part("mast"),
    boardId: part("board"),
    shimSetId: part("shims"),
    mastPositionMm: 60,
  };
  const changes: Readonly<Record<string, object>> = {
    "Long rail, no shim": {},
    "Long rail, half shim": { shimStackDeg: 0.5 },
    "Long rail, rear 50": { rearWingId: part("rear50") },
    "High aspect 780": { frontWingId: part("front780"), mastPositionMm: 50 },
  };
  const setups = new Map<string, string>();
  let first: string | null = null;
  for (const name of names) {
    const made = await createSetup(ctx, { ...base, ...changes[name], name }, first);
    first ??= made.id;
    setups.set(name, made.id);
  }
  return setups;
}
