import Link from "next/link";
import { useId, type ComponentPropsWithRef, type ReactNode } from "react";
import { classNames } from "@/lib/display/class-names";

export type TableProps = {
  /** Names the table and its scroller. */
  caption: string;
  /** Hidden by default: a Section title usually says the same above it. */
  captionShown?: boolean;
  className?: string;
  children: ReactNode;
};

/** A table in its own horizontal scroller, reachable and scrollable by keyboard. Rows by Tr, cells by Th and Td. */
export function Table({ caption, captionShown = false, className, children }: TableProps) {
  const id = useId();
  return (
    <div
      role="region"
      aria-labelledby={id}
      tabIndex={0}
      className="rule-ink max-w-full overflow-x-auto print:overflow-visible"
    >
      <table className={classNames("w-full border-collapse text-left", className)}>
        <caption id={id} className={captionShown ? "text-muted py-2 text-left text-sm" : "sr-only"}>
          {caption}
        </caption>
        {children}
      </table>
    </div>
  );
}

/** A row of the body with its hairline; `current` marks the one the cursor or the address points at. */
export function Tr({
  current = false,
  className,
  ...rest
}: ComponentPropsWithRef<"tr"> & { current?: boolean }) {
  return (
    <tr
      aria-current={current || undefined}
      className={classNames("rule-hair", current && "bg-shell", className)}
      {...rest}
    />
  );
}

export type ThProps = Omit<ComponentPropsWithRef<"th">, "align"> & {
  numeric?: boolean;
  /** Goes small behind the words, for example "kn". */
  unit?: string;
  /** With an address, the head is a link that sorts by this column. */
  sortHref?: string;
  /** Set on the one column that sorts. */
  sorted?: "ascending" | "descending";
};

/** Head of a column (default) or, with scope="row", of a row. */
export function Th(props: ThProps) {
  const { numeric = false, unit, sortHref, sorted, scope = "col", className, children, ...rest } = props;
  const words = (
    <>
      {children}
      {unit && <span className="unit"> {unit}</span>}
    </>
  );
  return (
    <th
      scope={scope}
      aria-sort={sorted}
      className={classNames(
        "px-2 py-2 [overflow-wrap:normal] print:py-0.5 first:pl-0 last:pr-0",
        scope === "col"
          ? "border-ink border-b align-bottom text-sm font-semibold"
          : "align-baseline font-medium",
        numeric && "text-right",
        className,
      )}
      {...rest}
    >
      {sortHref ? (
        <Link
          href={sortHref}
          scroll={false}
          className={classNames(
            "-my-0.5 inline-flex items-baseline gap-1 py-0.5 underline decoration-hairline underline-offset-4 hover:decoration-ink",
            // The mark stands on the free side, so that the words end where their figures end.
            numeric && "flex-row-reverse",
          )}
        >
          <span>{words}</span>
          <span
            aria-hidden="true"
            className={classNames("text-buoy-text inline-block w-2.5", !sorted && "invisible")}
          >
            {sorted === "ascending" ? "▲" : "▼"}
          </span>
        </Link>
      ) : (
        words
      )}
    </th>
  );
}

/** A cell; numeric ones are mono, right-aligned, with tabular figures. */
export function Td({
  numeric = false,
  className,
  ...rest
}: ComponentPropsWithRef<"td"> & { numeric?: boolean }) {
  return (
    <td
      className={classNames(
        "px-2 py-2 align-baseline print:py-0.5 first:pl-0 last:pr-0",
        numeric && "num text-right",
        className,
      )}
      {...rest}
    />
  );
}
