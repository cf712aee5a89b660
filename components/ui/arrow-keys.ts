import type { KeyboardEvent } from "react";

const steps: Record<string, number> = { ArrowDown: 1, ArrowRight: 1, ArrowUp: -1, ArrowLeft: -1 };

/**
 * Arrow keys, Home and End move the focus among the elements that match, within the element the handler sits on.
 * Typing fields and radios keep their own arrows.
 */
export function moveByArrows(event: KeyboardEvent<HTMLElement>, selector: string): void {
  const target = event.target;
  if (!(target instanceof HTMLElement) || event.altKey || event.ctrlKey || event.metaKey) return;
  if (target.matches("input:not([type=checkbox]), select, textarea")) return;
  const items = [...event.currentTarget.querySelectorAll<HTMLElement>(selector)];
  const at = items.findIndex((item) => item === target || item.contains(target));
  if (at < 0) return;
  const step = steps[event.key];
  const to = event.key === "Home" ? 0 : event.key === "End" ? items.length - 1 : step === undefined ? -1 : at + step;
  const next = items[to];
  if (!next) return;
  event.preventDefault();
  next.focus();
}
