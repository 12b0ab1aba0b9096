import type { CompareBy } from "@/lib/server/log/log-filter";

/** What can be compared, with the words for the tab and for one group of it. */
export const COMPARE_BY_WORDS: Readonly<Record<CompareBy, { tab: string; one: string }>> = {
  setup: { tab: "Setups", one: "Setup" },
  front_wing: { tab: "Front wings", one: "Front wing" },
  rear_wing: { tab: "Rear wings", one: "Rear wing" },
  mast_position: { tab: "Mast positions", one: "Mast position" },
  shim: { tab: "Shims", one: "Shim" },
};
