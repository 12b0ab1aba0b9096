import { AppError } from "@/lib/errors/app-error";

/** Why an upload ended without a stored file, as HTTP says it (RFC 9110; 429: RFC 6585; 507: RFC 4918). */
export type UploadRefusalStatus = 400 | 408 | 413 | 422 | 429 | 503 | 507;

/** An upload that was stopped. The message is a sentence for the rider. */
export class UploadRefusedError extends AppError {
  readonly status: UploadRefusalStatus;

  constructor(status: UploadRefusalStatus, message: string, options: { cause?: unknown } = {}) {
    super(
      status === 413 || status === 429 || status === 507 ? "limit_exceeded" : "precondition",
      message,
      options,
    );
    this.name = "UploadRefusedError";
    this.status = status;
  }
}
