import type { Context } from "@/lib/server/context/context";
import { createPart } from "@/lib/server/gear/save-part";
import { createSetup } from "@/lib/server/gear/save-setup";

/** Invented front wing as a rider would enter it, dimensions in SI. */
export const FRONT_WING = {
  kind: "front_wing",
  maker: "Aldervane",
  model: "Long-rail 850",
  notes: "",
  dimensions: { areaM2: 0.09, spanM: 0.85 },
} as const;

export const REAR_WING = {
  kind: "rear_wing",
  maker: "Morrowkeel",
  model: "Rear 45",
  notes: "",
  dimensions: { areaM2: 0.0142, spanM: 0.36 },
} as const;

/** A front wing and a setup on it, through the verbs. */
export async function makeSetup(ctx: Context, name = "Long rail", change: Record<string, unknown> = {}) {
  const wing = await createPart(ctx, FRONT_WING);
  const setup = await createSetup(ctx, { name, frontWingId: wing.id, ...change });
  return { wing, setup };
}
