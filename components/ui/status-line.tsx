"use client";

import type { ReactNode } from "react";

/** One quiet line that is read out when it changes: "Saved 14:03". No message ever flies in and away. */
export function StatusLine({ children, wrong }: { children?: ReactNode; wrong?: boolean }) {
  return (
    <p role="status" aria-live="polite" className={wrong ? "field-error min-h-6" : "docket min-h-6"}>
      {children}
    </p>
  );
}
