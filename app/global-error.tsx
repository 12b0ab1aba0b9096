"use client";

import { ErrorReport } from "@/components/shell/error-report";
import "./globals.css";

/** The last resort: the root layout itself broke, so nothing of it can be relied on. */
export default function GlobalError({
  error,
  reset,
}: {
  error: Error & { digest?: string };
  reset: () => void;
}) {
  return (
    <html lang="en-GB">
      <body>
        <main id="main" className="page pb-16">
          <title>Error - Trimwake</title>
          <ErrorReport reference={error.digest} retry={reset} />
        </main>
      </body>
    </html>
  );
}
