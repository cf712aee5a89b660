"use client";

import { useState, useSyncExternalStore } from "react";
import { Button } from "@/components/ui/button";

const never = () => () => undefined;

/** An address of this site in full, to read or to copy. */
export function CopyLink({ path, words }: { path: string; words: string }) {
  const [said, setSaid] = useState("");
  const origin = useSyncExternalStore(
    never,
    () => window.location.origin,
    () => "",
  );
  const copy = async () => {
    try {
      await navigator.clipboard.writeText(`${origin}${path}`);
      setSaid("Copied.");
    } catch {
      setSaid("Copy it from the line itself.");
    }
  };
  return (
    <span className="flex flex-wrap items-baseline gap-x-3 gap-y-1">
      <a href={path} className="figures text-sm break-all">
        {origin}
        {path}
      </a>
      <Button kind="quiet" small onClick={() => void copy()}>
        {words}
      </Button>
      <span role="status" className="small-print">
        {said}
      </span>
    </span>
  );
}
