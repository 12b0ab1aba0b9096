"use client";

import Link from "next/link";
import { LinkButton } from "@/components/ui/link-button";
import { EmptyState } from "@/components/ui/empty-state";
import { Disclosure } from "@/components/ui/disclosure";
import { SubmitButton } from "@/components/ui/submit-button";
import { GearRows, type SetupOption } from "./gear-rows";
import { PanelForm, type PanelProps } from "./panel-form";
import { useBrushedStretch } from "./use-brushed-stretch";

const SUMMARY = "What was ridden";

/** Tags the session with a setup, or with several and the times they were changed. */
export function GearForm(props: PanelProps & { setups: readonly SetupOption[]; timeZone: string }) {
  const { setups, timeZone, ...panel } = props;
  // Heard here: the rows draw anew after an answer and would forget it.
  const stretch = useBrushedStretch();
  if (setups.length === 0) {
    return (
      <Disclosure summary={SUMMARY} className="rule-hair">
        <EmptyState
          kind="first"
          title="Your quiver holds no setup yet"
          action={
            <LinkButton look="main" href="/quiver/setups/new">
              Make a setup
            </LinkButton>
          }
        >
          Say once which front wing, rear wing and mast position belong together; then every session can say
          what it was ridden on, and setups can be compared.
        </EmptyState>
      </Disclosure>
    );
  }
  return (
    <PanelForm
      {...panel}
      summary={SUMMARY}
      buttons={
        <>
          <SubmitButton busyText="Saving">Save what was ridden</SubmitButton>
          <LinkButton look="quiet" href="/quiver/setups/new">
            New setup
          </LinkButton>
        </>
      }
    >
      {({ values, errorOf }) => (
        <>
          <GearRows stretch={stretch} values={values} errorOf={errorOf} setups={setups} timeZone={timeZone} />
          <p className="text-muted text-sm">
            Setups are put together in the{" "}
            <Link href="/quiver" className="link">
              quiver
            </Link>
            .
          </p>
        </>
      )}
    </PanelForm>
  );
}
