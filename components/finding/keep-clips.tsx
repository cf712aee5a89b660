"use client";

import { useSearchParams } from "next/navigation";
import { useEffect } from "react";
import { storeClips, useClips } from "@/components/shell/clips";

/** Puts what is clipped back into the address after a move to another page of the list, so that it can be shared. */
export function KeepClips() {
  const { clips } = useClips();
  const missing = useSearchParams().get("clip") === null;

  useEffect(() => {
    if (missing && clips.length > 0) storeClips(clips);
  }, [missing, clips]);

  return null;
}
