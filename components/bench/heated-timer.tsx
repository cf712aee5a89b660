"use client";

import { useEffect, useState } from "react";
import { Button } from "@/components/ui/button";

const mostS = 30;

/** Counts the seconds with the heater on, from the press, and says when it must be off. */
export function HeatedTimer() {
  const [since, setSince] = useState<number>();
  const [now, setNow] = useState(0);
  useEffect(() => {
    if (since === undefined) return;
    const ticking = setInterval(() => setNow(Date.now()), 250);
    return () => clearInterval(ticking);
  }, [since]);
  const left = since === undefined ? mostS : Math.max(0, Math.ceil(mostS - Math.max(0, now - since) / 1000));
  const start = () => {
    const at = Date.now();
    setNow(at);
    setSince(at);
  };
  return (
    <div className="flex flex-wrap items-center gap-3">
      {since === undefined ? (
        <Button small onClick={start}>
          Heater is on: count 30 s
        </Button>
      ) : (
        <Button small onClick={() => setSince(undefined)}>
          Heater is off
        </Button>
      )}
      <span className="figures text-2xl" role="timer" aria-label="Seconds left with the heater on">
        {left} s
      </span>
      <span role="alert" className="font-bold">
        {since !== undefined && left === 0 ? "Time is up: heater off now." : null}
      </span>
    </div>
  );
}
