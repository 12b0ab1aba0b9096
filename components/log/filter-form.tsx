import type { ReactNode } from "react";
import { Button } from "@/components/ui/button";
import { Disclosure } from "@/components/ui/disclosure";
import { LinkButton } from "@/components/ui/link-button";
import { FilterFields, type FilterChoices } from "./filter-fields";

/**
 * Narrows a list by the URL: a plain GET form, so that a filtered log can be bookmarked, sent and walked back from.
 * `kept` are parameters that stay as they are (sort, what to compare by).
 */
export function FilterForm(props: {
  action: string;
  values: Readonly<Record<string, string | number | undefined>>;
  kept: Readonly<Record<string, string>>;
  choices: FilterChoices;
  narrowedBy: number;
  /** More fields of the same form, below the filter's own. */
  children?: ReactNode;
}) {
  const { action, values, kept, choices, narrowedBy, children } = props;
  const summary = narrowedBy === 0 ? "Filter" : `Filter: narrowed by ${narrowedBy}`;
  return (
    <Disclosure summary={summary} open={narrowedBy > 0}>
      <form action={action} method="get" className="flex flex-col gap-4 py-2">
        {Object.entries(kept).map(([name, value]) => (
          <input key={name} type="hidden" name={name} value={value} />
        ))}
        <FilterFields values={values} choices={choices} />
        {children}
        <div className="flex flex-wrap gap-3">
          <Button type="submit" look="main">
            Apply
          </Button>
          <LinkButton href={action} look="quiet">
            Clear the filter
          </LinkButton>
        </div>
      </form>
    </Disclosure>
  );
}
