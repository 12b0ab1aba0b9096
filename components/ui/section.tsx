import type { ReactNode } from "react";
import { classNames } from "@/lib/display/class-names";

/** A part of a page: its title, the sentence that says how to read it, then the thing itself. */
export function Section({
  title,
  reading,
  id,
  actions,
  className,
  children,
}: {
  title: ReactNode;
  reading?: ReactNode;
  /** Also names the section; give it where something links here. */
  id: string;
  actions?: ReactNode;
  className?: string;
  children: ReactNode;
}) {
  return (
    <section aria-labelledby={`${id}-title`} id={id} className={classNames("mt-10 print:mt-6", className)}>
      <div className="flex flex-wrap items-baseline justify-between gap-x-6 gap-y-2 pb-2">
        <div className="flex min-w-0 flex-wrap items-baseline gap-x-3">
          <h2 id={`${id}-title`} className="text-lg">
            {title}
          </h2>
          {reading && <p className="text-muted text-sm">{reading}</p>}
        </div>
        {actions && <div className="no-print flex flex-wrap gap-2">{actions}</div>}
      </div>
      {children}
    </section>
  );
}
