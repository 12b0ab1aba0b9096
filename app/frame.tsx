import type { ReactNode } from "react";
import { PageFrame } from "@/components/shell/page-frame";
import { currentUser } from "@/lib/server/auth/current-user";
import { env } from "@/lib/server/env/env";
import { signOutAction } from "./sign-out";
import { themeChoice } from "./theme-choice";

/** The page frame for whoever is at the screen. */
export async function Frame({ children }: { children: ReactNode }) {
  const person = await currentUser();
  return (
    <PageFrame
      person={person === null ? null : { name: person.name }}
      signOut={signOutAction}
      demo={env().demo}
      theme={await themeChoice()}
    >
      {children}
    </PageFrame>
  );
}
