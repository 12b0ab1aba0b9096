import { Disclosure } from "@/components/ui/disclosure";
import type { getPart, SetupWithUse } from "@/lib/server/gear/read-gear";
import { PartTable } from "./part-table";
import { SetupTable } from "./setup-table";

/** What is no longer ridden, out of the way and not lost; nothing when nothing was retired. */
export function RetiredGear(props: {
  parts: readonly Awaited<ReturnType<typeof getPart>>[];
  setups: readonly SetupWithUse[];
  partNames: ReadonlyMap<string, string>;
}) {
  const { parts, setups, partNames } = props;
  if (parts.length + setups.length === 0) return null;
  return (
    <Disclosure summary={`Retired: ${setups.length} setups, ${parts.length} parts`}>
      {setups.length > 0 && <SetupTable caption="Retired setups" setups={setups} partNames={partNames} />}
      {parts.length > 0 && <PartTable caption="Retired parts" parts={parts} />}
    </Disclosure>
  );
}
