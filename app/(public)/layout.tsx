import type { ReactNode } from "react";
import { Frame } from "@/app/frame";

export default function PublicLayout({ children }: { children: ReactNode }) {
  return <Frame>{children}</Frame>;
}
