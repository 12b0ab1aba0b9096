import type { ReactNode } from "react";

/** A figure with its unit small behind it, kept on one line. */
export function Unit({ value, unit }: { value: ReactNode; unit: string }) {
  return (
    <span className="num">
      {value}
      {unit && <span className="unit">{`\u00a0${unit}`}</span>}
    </span>
  );
}
