"use client";

import Link from "next/link";
import { Button } from "@/components/ui/button";
import { Field } from "@/components/ui/field";
import { Section } from "@/components/ui/section";
import { Select } from "@/components/ui/select";

export type SetupOption = { readonly id: string; readonly name: string };

/** "Ridden on": the setup that new sessions are tagged with; last time's stands there already. */
export function SetupChoice({
  setups,
  lastUsedId,
  chosenId,
  onChoose,
  others,
  onTagOthers,
}: {
  setups: readonly SetupOption[];
  lastUsedId: string | null;
  chosenId: string | null;
  onChoose: (setupId: string | null) => void;
  /** Sessions of this visit that carry another tag than the chosen one. */
  others: number;
  onTagOthers: () => void;
}) {
  const chosen = setups.find(({ id }) => id === chosenId);
  return (
    <Section
      id="ridden-on"
      title="Ridden on"
      reading="Goes on every session you upload here."
      className="lg:mt-0"
    >
      {setups.length === 0 ? (
        <p className="text-muted">
          You have no setup yet.{" "}
          <Link className="link" href="/quiver">
            Put one together in the quiver
          </Link>
          , then sessions can be compared by it. Sessions can be tagged later too.
        </p>
      ) : (
        <div className="flex max-w-xl flex-col gap-3">
          <Field
            label="Setup"
            name="setupId"
            hint={chosenId !== null && chosenId === lastUsedId ? "Same as last time." : undefined}
          >
            {(control) => (
              <Select
                {...control}
                value={chosenId ?? ""}
                empty="None, tag later"
                options={setups.map(({ id, name }) => ({ value: id, label: name }))}
                onChange={(event) => {
                  onChoose(event.currentTarget.value === "" ? null : event.currentTarget.value);
                }}
              />
            )}
          </Field>
          {others > 0 && (
            <Button onClick={onTagOthers}>
              {chosen === undefined ? "Take the tag off" : `Put ${chosen.name} on`}{" "}
              {others === 1 ? "the session above" : `the ${others} sessions above`}
            </Button>
          )}
        </div>
      )}
    </Section>
  );
}
