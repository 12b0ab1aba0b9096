"use client";

import { ErrorReport } from "@/components/shell/error-report";

export default function PageError({
  error,
  reset,
}: {
  error: Error & { digest?: string };
  reset: () => void;
}) {
  return (
    <>
      <title>Error - Trimwake</title>
      <ErrorReport reference={error.digest} retry={reset} />
    </>
  );
}
