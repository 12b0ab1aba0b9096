import Link from "next/link";
import type { ReactNode } from "react";
import { classNames } from "@/lib/display/class-names";
import { Missing } from "./missing";

export type Figure = {
  readonly label: string;
  /** The number as text (lib/display); null when it is missing, with the reason in `note`. */
  readonly value: string | null;
  readonly unit?: string;
  /** Standard error or interval as text without its sign, for example "0.9". */
  readonly error?: string;
  /** Beside the figure when there is one, or the reason when there is none. */
  readonly note?: string;
  /** big: the few figures a session is about. */
  readonly big?: boolean;
  /** Where the figure is explained. */
  readonly href?: string;
};

/** Figures set like a tide table: words left, numbers in one column on the right, units small behind them. */
export function FigureList({
  figures,
  ruled = true,
  className,
}: {
  figures: readonly Figure[];
  /** False inside a frame that has its own line above. */
  ruled?: boolean;
  className?: string;
}) {
  return (
    <dl
      className={classNames(
        "grid grid-cols-[minmax(0,1fr)_auto_minmax(3.25rem,auto)] gap-x-1.5",
        ruled && "rule-ink",
        className,
      )}
    >
      {figures.map((figure) => (
        <FigureRow key={figure.label} figure={figure} />
      ))}
    </dl>
  );
}

function FigureRow({ figure }: { figure: Figure }) {
  const { label, value, unit, error, note, big, href } = figure;
  const words: ReactNode = href ? (
    <Link href={href} className="underline decoration-transparent underline-offset-4 hover:decoration-buoy">
      {label}
    </Link>
  ) : (
    label
  );
  return (
    <div
      className={classNames(
        "rule-hair col-span-3 grid grid-cols-subgrid items-baseline",
        big ? "py-1.5" : "py-2 print:py-0.5",
      )}
    >
      <dt className={big ? "text-lg font-semibold" : undefined}>{words}</dt>
      <dd className={classNames("num text-right font-semibold", big ? "text-4xl leading-none" : "text-lg")}>
        {value ?? <Missing reason={note ?? "not enough data"} />}
      </dd>
      <dd className="text-muted text-xs leading-tight">
        {value !== null && [unit, error && `\u00b1\u00a0${error}`, note].filter(Boolean).join(" ")}
        {value === null && <span aria-hidden="true">{note}</span>}
      </dd>
    </div>
  );
}
