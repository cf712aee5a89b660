"use client";

import { useEffect, useId, useRef } from "react";

/** An en dash that says why the value is missing, on hover, on focus and to those who hear the page. Never a 0. */
export function Missing({ why }: { why: string }) {
  const id = useId();
  const mark = useRef<HTMLSpanElement>(null);
  const note = useRef<HTMLSpanElement>(null);

  const hide = () => {
    if (note.current?.matches(":popover-open")) note.current.hidePopover();
  };
  const place = () => {
    const [from, tip] = [mark.current, note.current];
    if (!from || !tip?.matches(":popover-open")) return;
    // In the top layer, so that no scrolling table cuts it off.
    const at = from.getBoundingClientRect();
    const left = Math.min(Math.max(8, at.left), document.documentElement.clientWidth - tip.offsetWidth - 8);
    const below = at.bottom + 2 + tip.offsetHeight < window.innerHeight;
    tip.style.left = `${left}px`;
    tip.style.top = `${below ? at.bottom + 2 : at.top - 2 - tip.offsetHeight}px`;
  };
  const show = () => {
    if (note.current?.showPopover && !note.current.matches(":popover-open")) note.current.showPopover();
    place();
  };

  useEffect(() => {
    const escape = (event: KeyboardEvent) => {
      if (event.key === "Escape") hide();
    };
    document.addEventListener("keydown", escape);
    document.addEventListener("scroll", place, true);
    return () => {
      document.removeEventListener("keydown", escape);
      document.removeEventListener("scroll", place, true);
    };
  }, []);

  return (
    <span
      className="missing"
      ref={mark}
      tabIndex={0}
      role="note"
      aria-label={`Missing: ${why}`}
      onPointerEnter={show}
      onPointerLeave={hide}
      onFocus={show}
      onBlur={hide}
    >
      <span aria-hidden className="missing-mark">
        –
      </span>
      <span aria-hidden className="missing-why" id={id} popover="manual" ref={note}>
        {why}
      </span>
    </span>
  );
}
