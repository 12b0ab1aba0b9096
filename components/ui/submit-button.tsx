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
    <Button
      type="submit"
      look={look}
      aria-disabled={pending}
      onClick={(event) => {
        if (pending) event.preventDefault();
        else onClick?.(event);
      }}
      {...rest}
    >
      <span role="status" className="contents">
        {pending ? (busyText ?? children) : children}
      </span>
    </Button>
  );
}
