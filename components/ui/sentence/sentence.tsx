"use client";

import clsx from "clsx";
import Link from "next/link";
import { Fragment, useEffect, useId, useRef, useState, useSyncExternalStore, type MouseEvent } from "react";
import { moveByArrows } from "@/components/ui/arrow-keys";
import { partKey, partParams, type SentenceMore, type SentencePiece } from "./pieces";
import { SentencePanel } from "./sentence-panel";
import { useSentenceAddress, type Param } from "./use-sentence-address";

export type SentenceProps = {
  /** What the form is, for those who hear it: "Which designs". */
  label: string;
  /** The page's path; the address carries the whole sentence. */
  action: string;
  pieces: readonly SentencePiece[];
  /** Parameters to keep beside the sentence's own: sort, columns, picks. */
  kept?: readonly Param[];
  /** "64 of 318". */
  found: string;
  /** What is counted: "designs". */
  countOf: string;
  more?: readonly SentenceMore[];
  clearHref?: string;
  /** The part to show open: the address's `open`, for those without scripts. */
  open?: string;
};

const addKey = "add-a-part";
const never = () => () => undefined;

/**
 * A sentence to read aloud. Each underlined part opens its strip of choices. A plain GET form where scripts don't run:
 * a part is a submit button named `open`, and the strip has a button that shows the answer.
 */
export function Sentence(props: SentenceProps) {
  const { label, action, pieces, kept = [], found, countOf, more = [], clearHref } = props;
  const id = useId();
  const form = useRef<HTMLFormElement>(null);
  const opener = useRef<HTMLButtonElement>(null);
  const live = useSyncExternalStore(
    never,
    () => true,
    () => false,
  );
  const [open, setOpen] = useState(props.open);
  const [byHand, setByHand] = useState(false);
  const [asked, setAsked] = useState(props.open);
  // An added part comes by an address that opens it; an address that opens nothing closes nothing.
  if (asked !== props.open) {
    setAsked(props.open);
    if (props.open !== undefined) {
      setOpen(props.open);
      setByHand(true);
    }
  }
  const { shown, change, pending } = useSentenceAddress(action, pieces, kept);
  const part = shown.find((piece) => piece.kind !== "text" && partKey(piece) === open);
  const opened = part && part.kind !== "text" ? part : undefined;
  const adding = open === addKey && more.length > 0;

  useEffect(() => {
    if (!byHand || open === undefined) return;
    const panel = form.current?.querySelector<HTMLElement>(".sentence-panel");
    const first = (selector: string) => panel?.querySelector<HTMLElement>(selector);
    (first("input:checked") ?? first("input:not(:disabled), a") ?? panel)?.focus();
  }, [byHand, open]);

  const toggle = (key: string) => (event: MouseEvent<HTMLButtonElement>) => {
    event.preventDefault();
    opener.current = event.currentTarget;
    setByHand(true);
    setOpen(open === key ? undefined : key);
  };
  const close = () => {
    setOpen(undefined);
    opener.current?.focus();
  };
  const opens = (key: string) => ({
    // Not a submit button once scripts run, or Enter in a slot would press the first part.
    type: live ? ("button" as const) : ("submit" as const),
    name: "open",
    value: key,
    "aria-expanded": open === key,
    "aria-controls": open === key ? `${id}-panel` : undefined,
    onClick: toggle(key),
  });

  return (
    <form
      ref={form}
      aria-label={label}
      action={action}
      method="get"
      className={clsx(live && "sentence-live")}
      onSubmit={(event) => event.preventDefault()}
      onKeyDown={(event) => {
        if (event.key === "Escape" && open !== undefined) close();
      }}
    >
      {kept.map(([name, value], index) => (
        <input key={index} type="hidden" name={name} value={value} />
      ))}
      <p className="sentence" aria-busy={pending}>
        {shown.map((piece, index) =>
          piece.kind === "text" ? (
            <Fragment key={index}>{piece.text}</Fragment>
          ) : (
            <Fragment key={index}>
              <button {...opens(partKey(piece))} className={clsx("sentence-part", piece.any && "sentence-part-any")}>
                <span className="sr-only">{piece.label}: </span>
                {piece.words}
              </button>
              {piece === opened
                ? null
                : partParams(piece).map(([name, value]) => (
                    <input key={name + value} type="hidden" name={name} value={value} />
                  ))}
            </Fragment>
          ),
        )}{" "}
        {more.length > 0 ? (
          <button {...opens(addKey)} className="sentence-part sentence-part-any sentence-add screen-only">
            and …<span className="sr-only"> add a part</span>
          </button>
        ) : null}{" "}
        <span className="sentence-found" role="status">
          {found}.
        </span>
      </p>
      {opened ? (
        <SentencePanel
          key={open}
          id={`${id}-panel`}
          part={opened}
          found={found}
          countOf={countOf}
          clearHref={clearHref}
          live={live}
          onChange={change}
          onClose={close}
        />
      ) : null}
      {adding ? (
        <div id={`${id}-panel`} role="group" aria-label="Add a part" className="sentence-panel" tabIndex={-1}>
          <ul className="sentence-choices" onKeyDown={(event) => moveByArrows(event, "a")}>
            {more.map(({ label: word, href }) => (
              <li key={href}>
                <Link href={href} className="inline-flex min-h-8 items-center">
                  {word}
                </Link>
              </li>
            ))}
          </ul>
        </div>
      ) : null}
      {opened || adding ? <div className="sentence-scrim" onClick={close} /> : null}
    </form>
  );
}
