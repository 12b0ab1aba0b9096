"use client";

import { ErrorReport } from "@/components/shell/error-report";

export default function SessionError({
  error,
  reset,
}: {
  error: Error & { digest?: string };
  reset: () => void;
}) {
  return (
    <>
      <title>Error: session - Trimwake</title>
      <ErrorReport reference={error.digest} retry={reset} />
    </>
  );
}
