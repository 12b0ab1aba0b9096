import type { ComponentProps } from "react";
import { DateInput } from "./date-input";
import { Field, type FieldProps } from "./field";
import { NumberInput, type NumberInputProps } from "./number-input";
import { PasswordInput, type PasswordInputProps } from "./password-input";
import { Select, type SelectProps } from "./select";
import { TextArea } from "./text-area";
import { TextInput, type TextInputProps } from "./text-input";

/** Splits what belongs to the frame round a control from what belongs to the control. */
function split<P extends FieldProps>(props: P) {
  const { label, name, id, hint, error, optional, className, ...control } = props;
  return { frame: { label, name, id, hint, error, optional, className }, control };
}

type With<P> = FieldProps & Omit<P, keyof FieldProps>;

export function TextField(props: With<TextInputProps>) {
  const { frame, control } = split(props);
  return <Field {...frame}>{(wiring) => <TextInput {...control} {...wiring} />}</Field>;
}

export function PasswordField(props: With<PasswordInputProps>) {
  const { frame, control } = split(props);
  return <Field {...frame}>{(wiring) => <PasswordInput {...control} {...wiring} />}</Field>;
}

export function NumberField(props: With<NumberInputProps>) {
  const { frame, control } = split(props);
  return <Field {...frame}>{(wiring) => <NumberInput {...control} {...wiring} />}</Field>;
}

export function TextAreaField(props: With<ComponentProps<typeof TextArea>>) {
  const { frame, control } = split(props);
  return <Field {...frame}>{(wiring) => <TextArea {...control} {...wiring} />}</Field>;
}

export function SelectField(props: With<SelectProps>) {
  const { frame, control } = split(props);
  return <Field {...frame}>{(wiring) => <Select {...control} {...wiring} />}</Field>;
}

export function DateField(props: With<ComponentProps<typeof DateInput>>) {
  const { frame, control } = split(props);
  return <Field {...frame}>{(wiring) => <DateInput {...control} {...wiring} />}</Field>;
}
