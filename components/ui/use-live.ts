"use client";

import { useSyncExternalStore } from "react";

const never = () => () => undefined;

/** False in the server's page and true once JavaScript runs it: a control that needs it is not there before. */
export function useLive(): boolean {
  return useSyncExternalStore(
    never,
    () => true,
    () => false,
  );
}
