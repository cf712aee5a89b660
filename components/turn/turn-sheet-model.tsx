"use client";

import { loadTurnable } from "@/lib/client/fit/turnable";
import { TurnView } from "./turn-view";

export type TurnSheetModelProps = { address: string; name: string; bytes: number; label: string };

/** A public model file in 3D, fetched only once it is asked for. */
export function TurnSheetModel({ address, name, bytes, label }: TurnSheetModelProps) {
  return <TurnView label={label} bytes={bytes} load={(loading) => loadTurnable(address, name, loading)} />;
}
