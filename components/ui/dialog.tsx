"use client";

import { useEffect, useId, useRef, type ReactNode } from "react";
import { Button, type ButtonProps } from "./button";

export type DialogProps = {
  title: ReactNode;
  /** What the opening button says; it gets the focus back when the dialog closes. */
  trigger: ReactNode;
  triggerProps?: Omit<ButtonProps, "onClick" | "children">;
  /** Put a DialogClose among them. */
  children: ReactNode;
  className?: string;
};

/**
 * The browser's own modal dialog: Escape closes, focus stays inside and comes back. The command attributes
 * open it before (or without) JavaScript where the browser knows them. The focus goes to the first control, or
 * to the one marked with data-first-focus: in a dialog that ends something, the way back.
 */
export function Dialog({ title, trigger, triggerProps, children, className }: DialogProps) {
  const dialog = useRef<HTMLDialogElement>(null);
  const id = useId();
  useEffect(() => {
    const element = dialog.current;
    if (!element) return;
    // A press on the backdrop lands on the dialog element itself.
    const onPress = (event: MouseEvent) => {
      if (event.target === element) element.close();
    };
    element.addEventListener("click", onPress);
    return () => element.removeEventListener("click", onPress);
  }, []);
  return (
    <>
      <Button
        {...triggerProps}
        aria-haspopup="dialog"
        {...{ command: "show-modal", commandfor: id }}
        onClick={() => {
          if (!dialog.current?.open) dialog.current?.showModal();
          dialog.current?.querySelector<HTMLElement>("[data-first-focus]")?.focus();
        }}
      >
        {trigger}
      </Button>
      <dialog
        ref={dialog}
        id={id}
        aria-labelledby={`${id}-title`}
        className={
          className ??
          "border-ink bg-paper text-ink m-auto max-h-[90dvh] w-[min(34rem,calc(100vw-2rem))] overflow-y-auto border"
        }
      >
        <div className="p-4 sm:p-6">
          <h2 id={`${id}-title`} className="text-xl">
            {title}
          </h2>
          <div className="mt-3">{children}</div>
        </div>
      </dialog>
    </>
  );
}

/** A button that closes the dialog it stands in. */
export function DialogClose({ children, ...rest }: Omit<ButtonProps, "onClick" | "type">) {
  return (
    <Button {...rest} onClick={(event) => event.currentTarget.closest("dialog")?.close()}>
      {children}
    </Button>
  );
}
