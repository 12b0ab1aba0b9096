import type { SendResult, Sending } from "./upload-queue";

/** Nothing moved for this long: the connection is gone, whatever it says. */
const STALL_MS = 60_000;

/** Sends one file as the raw body of a request. XMLHttpRequest, because fetch reports no progress of what it sends. */
export function sendFile(file: File, onShare: (share: number) => void): Sending {
  const request = new XMLHttpRequest();
  const result = new Promise<SendResult>((resolve) => {
    let stall: ReturnType<typeof setTimeout> | undefined;
    let isStalled = false;
    const moved = () => {
      clearTimeout(stall);
      stall = setTimeout(() => {
        isStalled = true;
        request.abort();
      }, STALL_MS);
    };
    request.upload.addEventListener("progress", (event) => {
      moved();
      if (event.lengthComputable && event.total > 0) onShare(event.loaded / event.total);
    });
    request.addEventListener("load", () => {
      resolve(answer(request.status, request.responseText));
    });
    request.addEventListener("error", () => {
      resolve(broken("The file could not be sent: the connection broke. Try again."));
    });
    request.addEventListener("abort", () => {
      resolve(
        broken(isStalled ? "Nothing moved for a minute. Try again where the connection is better." : ""),
      );
    });
    request.addEventListener("loadend", () => {
      clearTimeout(stall);
    });
    request.open("POST", "/api/uploads");
    request.setRequestHeader("content-type", "application/octet-stream");
    request.setRequestHeader("x-file-name", encodeURIComponent(file.name));
    request.send(file);
    moved();
  });
  return {
    result,
    stop: () => {
      request.abort();
    },
  };
}

function broken(message: string): SendResult {
  return { ok: false, message, again: true, signedOut: false };
}

/** The server's answer as a result; what is no answer of ours (a proxy's page) is told in our words. */
export function answer(status: number, text: string): SendResult {
  const body = parsed(text);
  if ((status === 200 || status === 201) && typeof body["uploadId"] === "string") {
    return { ok: true, uploadId: body["uploadId"] };
  }
  const title = body["title"];
  return {
    ok: false,
    message:
      typeof title === "string"
        ? title
        : `The file could not be sent (the server answered ${status}). Try again.`,
    again: status !== 413 && status !== 422,
    signedOut: status === 401,
  };
}

function parsed(text: string): Record<string, unknown> {
  try {
    const value: unknown = JSON.parse(text);
    return typeof value === "object" && value !== null ? (value as Record<string, unknown>) : {};
  } catch {
    return {};
  }
}
