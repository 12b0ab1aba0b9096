"use client";

import { Button } from "@/components/ui/button";
import { LinkButton } from "@/components/ui/link-button";

/** What a person can do when a page broke, and what they can tell us; never what the program said. */
export function ErrorReport({ reference, retry }: { reference: string | undefined; retry: () => void }) {
  return (
    <div role="alert" className="pt-6">
      <h1 className="text-3xl sm:text-[2.5rem]">This page could not be shown</h1>
      <p className="text-muted mt-2 max-w-prose">
        Something went wrong on our side. What you had saved is safe. Try again; if it happens again, tell the
        people who run this Trimwake the reference below.
      </p>
      <p className="mt-4">
        Reference{" "}
        <span className="num font-semibold">{reference ?? "none (it happened in this browser)"}</span>
      </p>
      <div className="mt-6 flex flex-wrap gap-3">
        <Button look="main" onClick={retry}>
          Try again
        </Button>
        <LinkButton href="/">To the front page</LinkButton>
      </div>
    </div>
  );
}
