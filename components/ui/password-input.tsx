"use client";

import { useState, type ComponentPropsWithRef } from "react";
import { classNames } from "@/lib/display/class-names";
import { controlClass } from "./control-class";
import { useLive } from "./use-live";

export type PasswordInputProps = Omit<ComponentPropsWithRef<"input">, "type"> & {
  autoComplete: "current-password" | "new-password";
};

/** Paste and password managers work; the switch is a real button and says what it does. */
export function PasswordInput({ className, ...rest }: PasswordInputProps) {
  const [shown, setShown] = useState(false);
  const live = useLive();
  return (
    <div className="flex">
      <input
        type={shown ? "text" : "password"}
        spellCheck={false}
        autoCapitalize="off"
        className={classNames(controlClass, "flex-1", live && "border-r-0", className)}
        {...rest}
      />
      {live && (
        <button
          type="button"
          aria-pressed={shown}
          aria-controls={rest.id}
          onClick={() => setShown(!shown)}
          className="frame hover:bg-kelp min-h-11 w-20 shrink-0 font-semibold"
        >
          {shown ? "Hide" : "Show"}
          <span className="sr-only"> password</span>
        </button>
      )}
    </div>
  );
}
