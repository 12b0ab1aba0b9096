"use client";

import Link from "next/link";
import { usePathname } from "next/navigation";
import type { ReactNode } from "react";

/** A link of the header that knows whether its part of the house is open. */
export function NavLink({
  href,
  className,
  children,
}: {
  href: string;
  className: string;
  children: ReactNode;
}) {
  const path = usePathname();
  const current = path === href ? "page" : path.startsWith(`${href}/`) ? "true" : undefined;
  return (
    <Link href={href} aria-current={current} className={className}>
      {children}
    </Link>
  );
}
