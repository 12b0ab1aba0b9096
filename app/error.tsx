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
    <main id="main" className="page pb-16">
      <title>Error - Trimwake</title>
      <ErrorReport reference={error.digest} retry={reset} />
    </main>
  );
}
