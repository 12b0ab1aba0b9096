import Link from "next/link";
import { classNames } from "@/lib/display/class-names";

export type Tab = { readonly href: string; readonly label: string; readonly current: boolean };

/** Views of one thing as links: the address says which one, the back button works. */
export function Tabs({
  label,
  tabs,
  className,
}: {
  /** Names the row for a screen reader, for example "Settings pages". */
  label: string;
  tabs: readonly Tab[];
  className?: string;
}) {
  return (
    <nav aria-label={label} className={classNames("no-print", className)}>
      <ul className="flex flex-wrap gap-x-6 gap-y-1">
        {tabs.map((tab) => (
          <li key={tab.href}>
            <Link
              href={tab.href}
              aria-current={tab.current ? "page" : undefined}
              className="mark-current inline-flex min-h-9 items-center"
            >
              {tab.label}
            </Link>
          </li>
        ))}
      </ul>
    </nav>
  );
}
