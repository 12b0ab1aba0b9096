"use client";

import { toast } from "sonner";

/** Says that something was done; with `undo`, offers the way back. */
export function toastDone(title: string, undo?: { label: string; run: () => void }): void {
  toast.success(title, undo && { action: { label: undo.label, onClick: undo.run } });
}

/** Says again, in passing, what also stands on the page. */
export function toastProblem(title: string): void {
  toast.error(title);
}
