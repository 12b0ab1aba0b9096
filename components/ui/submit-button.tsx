"use client";

import { useFormStatus } from "react-dom";
import { Button, type ButtonProps } from "./button";

export type SubmitButtonProps = Omit<ButtonProps, "type"> & {
  /** Said while the form is on its way, for example "Saving". */
  busyText?: string;
};

/** Sends its form once: a second press while the first is on its way does nothing. */
export function SubmitButton({ busyText, look = "main", children, onClick, ...rest }: SubmitButtonProps) {
  const { pending } = useFormStatus();
  return (
    <>
      <Button
        {...rest}
        type="submit"
        look={look}
        aria-disabled={pending || undefined}
        onClick={(event) => {
          if (pending) event.preventDefault();
          else onClick?.(event);
        }}
      >
        {pending && busyText ? busyText : children}
      </Button>
      {/* Beside the button, not in it: what stands in a button is its name. */}
      <span role="status" className="sr-only">
        {pending ? (busyText ?? "Working") : ""}
      </span>
    </>
  );
}
