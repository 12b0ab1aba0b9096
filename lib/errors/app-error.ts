/** The closed list of things that can go wrong at a verb. Somebody else's row is `not_found`. */
export type AppErrorCode =
  | "unauthenticated"
  | "forbidden"
  | "not_found"
  | "conflict"
  | "validation"
  | "limit_exceeded"
  | "precondition"
  | "internal";

/** Field name to sentence, for forms; the sentence says what to do. */
export type FieldErrors = Readonly<Record<string, string>>;

/**
 * The one error a verb throws. Its message is a sentence for the person at the screen, in plain words;
 * the cause is kept for the log and never shown.
 *
 * @example
 * new AppError("not_found", "This session is not here, or it is not yours to see.").code; // "not_found"
 */
export class AppError extends Error {
  readonly code: AppErrorCode;
  readonly fields: FieldErrors;

  constructor(code: AppErrorCode, message: string, options: { cause?: unknown; fields?: FieldErrors } = {}) {
    super(message, options.cause === undefined ? undefined : { cause: options.cause });
    this.name = "AppError";
    this.code = code;
    this.fields = options.fields ?? {};
  }
}
