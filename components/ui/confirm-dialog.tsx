"use client";

import { useEffect, useRef, type ReactNode } from "react";
import { useFormStatus } from "react-dom";
import type { ButtonLook, ButtonSize } from "./button-class";
import { Dialog, DialogClose } from "./dialog";
import { SubmitButton } from "./submit-button";

export type ConfirmDialogProps = {
  trigger: ReactNode;
  triggerLook?: ButtonLook;
  triggerSize?: ButtonSize;
  title: ReactNode;
  /** What happens, and whether there is a way back. */
  children: ReactNode;
  /** The deed in a word or two, for example "Delete session". */
  confirm: string;
  busyText?: string;
  /** A server action, or a function of the form's data. */
  action: (form: FormData) => void | Promise<void>;
  /** Hidden fields sent with the action. */
  fields?: Readonly<Record<string, string>>;
  look?: "main" | "danger";
};

/** Asks once before something that ends or publishes. Reversible things get a way back instead. */
export function ConfirmDialog(props: ConfirmDialogProps) {
  const { trigger, triggerLook = "plain", triggerSize = "normal", title, children, confirm } = props;
  const { busyText, action, fields = {}, look = "danger" } = props;
  return (
    <Dialog title={title} trigger={trigger} triggerProps={{ look: triggerLook, size: triggerSize }}>
      <form action={action}>
        <CloseWhenDone />
        {Object.entries(fields).map(([name, value]) => (
          <input key={name} type="hidden" name={name} value={value} />
        ))}
        <div className="text-muted">{children}</div>
        <div className="mt-6 flex flex-wrap gap-3">
          <SubmitButton look={look} busyText={busyText}>
            {confirm}
          </SubmitButton>
          <DialogClose data-first-focus>Keep it as it is</DialogClose>
        </div>
      </form>
    </Dialog>
  );
}

/** The action stays the form's own (it works before JavaScript), so its end is seen from the form's status. */
function CloseWhenDone() {
  const { pending } = useFormStatus();
  const wasPending = useRef(false);
  const mark = useRef<HTMLSpanElement>(null);
  useEffect(() => {
    if (wasPending.current && !pending) mark.current?.closest("dialog")?.close();
    wasPending.current = pending;
  }, [pending]);
  return <span ref={mark} hidden />;
}
