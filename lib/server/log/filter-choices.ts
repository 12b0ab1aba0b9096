import { partsOf, setupsOf } from "@/db/queries/gear";
import { spotsOf } from "@/db/queries/log";
import { PART_KIND_NAMES } from "@/lib/gear/dimension-fields";
import { requireUserId, type Context } from "@/lib/server/context/context";

export type FilterChoiceLists = {
  readonly frontWings: { value: string; label: string }[];
  readonly parts: { value: string; label: string }[];
  readonly setups: { value: string; label: string }[];
  readonly spots: string[];
};

/** What the asker's log can be narrowed by; retired gear stays in, its history counts. */
export async function filterChoices(ctx: Context): Promise<FilterChoiceLists> {
  const ownerId = requireUserId(ctx);
  const [parts, setups, spots] = await Promise.all([
    partsOf(ctx.db.read, ownerId),
    setupsOf(ctx.db.read, ownerId),
    spotsOf(ctx.db.read, ownerId),
  ]);
  const name = (part: (typeof parts)[number]) => `${part.maker} ${part.model}`;
  return {
    frontWings: parts
      .filter((part) => part.kind === "front_wing")
      .map((part) => ({ value: part.id, label: name(part) })),
    parts: parts.map((part) => ({
      value: part.id,
      label: `${name(part)} (${PART_KIND_NAMES[part.kind].toLowerCase()})`,
    })),
    setups: setups.map((setup) => ({ value: setup.id, label: setup.name })),
    spots,
  };
}
