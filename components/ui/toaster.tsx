"use client";

import { Toaster as Sonner } from "sonner";

/** Mounted once in the root layout. A toast is never the only place of an error. */
export function Toaster() {
  return (
    <Sonner
      position="bottom-right"
      visibleToasts={3}
      offset={16}
      mobileOffset={16}
      duration={8000}
      containerAriaLabel="Messages"
      toastOptions={{
        unstyled: true,
        classNames: {
          toast:
            "border border-l-4 border-ink bg-sheet text-ink p-4 w-full flex flex-wrap items-center gap-3",
          title: "font-semibold",
          description: "text-muted text-sm",
          success: "border-l-swell",
          error: "border-l-buoy-text",
          actionButton: "border-b-2 border-buoy font-semibold min-h-6",
          cancelButton: "border-b-2 border-hairline min-h-6",
        },
      }}
    />
  );
}
