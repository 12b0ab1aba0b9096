import { cookies } from "next/headers";
import type { ThemeChoice } from "@/components/shell/theme-switch";
import { currentUser } from "@/lib/server/auth/current-user";

/** The device's own choice first, then the person's, then the system's. */
export async function themeChoice(): Promise<ThemeChoice> {
  const kept = (await cookies()).get("theme")?.value;
  if (kept === "light" || kept === "dark" || kept === "system") return kept;
  return (await currentUser())?.theme ?? "system";
}
