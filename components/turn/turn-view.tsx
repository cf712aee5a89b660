"use client";

import { useEffect, useRef, useState, type KeyboardEvent } from "react";
import { usePalette, type Palette } from "@/components/charts/palette";
import { Button } from "@/components/ui/button";
import { Notice } from "@/components/ui/notice";
import { Progress } from "@/components/ui/progress";
import type { LoadingModel, Turnable } from "@/lib/client/fit/turnable";
import type { SceneLook, TurnScene } from "./turn-scene";

export type TurnViewProps = {
  /** What is seen, in words. */
  label: string;
  /** Gets the model once it is asked for. */
  load: (loading: LoadingModel) => Promise<Turnable>;
  /** Of the file, where it is fetched; undefined where it is here already. */
  bytes?: number;
};

type State =
  | { step: "asked" }
  | { step: "failed"; why: string }
  | { step: "shown"; model: Turnable; startScene: typeof import("./turn-scene").startScene };

const STEP_RAD = Math.PI / 12;
const ZOOM = 1.25;
const look = ({ paper, bar, ink, still }: Palette): SceneLook => ({ paper, surface: bar, ink, still });

/** The model in 3D, on demand: everything that draws it is loaded only once somebody presses. */
export function TurnView(props: TurnViewProps) {
  const [open, setOpen] = useState(false);
  return (
    <div className="grid justify-items-start gap-3">
      <Button aria-expanded={open} onClick={() => setOpen(!open)}>
        {open ? "Put the 3D view away" : "Turn it in 3D"}
      </Button>
      {open ? <Opened {...props} /> : null}
    </div>
  );
}

function Opened({ label, load, bytes }: TurnViewProps) {
  const [state, setState] = useState<State>({ step: "asked" });
  const [got, setGot] = useState(0);
  const first = useRef(load);
  useEffect(() => {
    const stop = new AbortController();
    const onBytes = (bytes: number) => void (stop.signal.aborted || setGot(bytes));
    Promise.all([import("./turn-scene"), first.current({ onBytes, signal: stop.signal })])
      .then(([{ startScene }, model]) => stop.signal.aborted || setState({ step: "shown", model, startScene }))
      .catch((error: unknown) => {
        if (!stop.signal.aborted)
          setState({ step: "failed", why: error instanceof Error ? error.message : String(error) });
      });
    return () => stop.abort();
  }, []);
  if (state.step === "failed") {
    return (
      <Notice title="The 3D view can’t be shown" live="alert">
        <p>{state.why} The drawing above shows the same mesh.</p>
      </Notice>
    );
  }
  if (state.step === "asked") {
    const words = got > 0 ? `${(got / 1e6).toFixed(1)} MB came` : "getting ready";
    return <Progress label="3D view" done={got} words={words} {...(bytes !== undefined && { of: bytes })} />;
  }
  return (
    <Stage
      label={label}
      model={state.model}
      startScene={state.startScene}
      onFail={() => setState({ step: "failed", why: "This browser draws no 3D: WebGL is off or missing." })}
    />
  );
}

type StageProps = {
  label: string;
  model: Turnable;
  startScene: typeof import("./turn-scene").startScene;
  onFail: () => void;
};

function Stage({ label, model, startScene, onFail }: StageProps) {
  const canvas = useRef<HTMLCanvasElement>(null);
  const scene = useRef<TurnScene | undefined>(undefined);
  const palette = usePalette();
  const latest = useRef({ palette, onFail });
  useEffect(() => {
    latest.current = { palette, onFail };
    if (palette) scene.current?.paint(look(palette));
  });
  useEffect(() => {
    const { palette: now } = latest.current;
    if (!canvas.current || !now) return;
    try {
      scene.current = startScene(canvas.current, model, look(now));
    } catch {
      latest.current.onFail();
    }
    return () => {
      scene.current?.dispose();
      scene.current = undefined;
    };
  }, [model, startScene]);
  const keys = (event: KeyboardEvent) => {
    const acts: Readonly<Record<string, () => void>> = {
      ArrowLeft: () => scene.current?.turn(-STEP_RAD, 0),
      ArrowRight: () => scene.current?.turn(STEP_RAD, 0),
      ArrowUp: () => scene.current?.turn(0, STEP_RAD),
      ArrowDown: () => scene.current?.turn(0, -STEP_RAD),
      "+": () => scene.current?.nearer(ZOOM),
      "-": () => scene.current?.nearer(1 / ZOOM),
      Home: () => scene.current?.reset(),
    };
    const act = acts[event.key];
    if (!act || event.ctrlKey || event.metaKey || event.altKey) return;
    event.preventDefault();
    act();
  };
  return (
    <div className="grid w-full gap-3 print:hidden">
      <div
        role="group"
        tabIndex={0}
        aria-label={`3D view. ${label}. Arrow keys turn it, plus and minus bring it nearer and away, Home resets it.`}
        onKeyDown={keys}
        className="w-full max-w-3xl border border-rule"
      >
        <canvas ref={canvas} aria-hidden className="block h-[min(70vh,28rem)] w-full touch-none" />
      </div>
      <div className="flex flex-wrap items-center gap-3">
        <Button small onClick={() => scene.current?.reset()}>
          Reset the view
        </Button>
        <Button small onClick={() => scene.current?.nearer(ZOOM)}>
          Nearer
        </Button>
        <Button small onClick={() => scene.current?.nearer(1 / ZOOM)}>
          Further
        </Button>
        <span className="small-print">
          Drag or use the arrow keys to turn it; two fingers or the wheel bring it nearer.
        </span>
      </div>
    </div>
  );
}
