"use client";

import { useSyncExternalStore } from "react";
import { usePathname, useSearchParams } from "next/navigation";

const never = () => () => undefined;

/** Only on paper: where this sheet stands, and by which method version it was worked out. */
export function PrintAddress({ methodVersion }: { methodVersion?: string }) {
  const path = usePathname();
  const query = useSearchParams().toString();
  const origin = useSyncExternalStore(
    never,
    () => window.location.origin,
    () => "",
  );
  return (
    <p className="print-only docket">
      {origin}
      {path}
      {query ? `?${query}` : ""}
      {methodVersion ? ` · ${methodVersion}` : ""}
    </p>
  );
}
