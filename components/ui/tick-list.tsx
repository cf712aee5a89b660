import type { ReactNode } from "react";
import { Button } from "./button";
import { Notice } from "./notice";
import { Slot, SlotGroup } from "./slot";

export type Ticks = Record<string, boolean>;
export type TickItem = { key: string; words: ReactNode };

export type TickListProps = {
  title: ReactNode;
  legend: ReactNode;
  hideLegend?: boolean;
  items: readonly TickItem[];
  ticked: Ticks;
  onTick: (ticked: Ticks) => void;
};

/** How many are still to be ticked. */
export const leftToTick = (items: readonly TickItem[], ticked: Ticks): number =>
  items.filter(({ key }) => !ticked[key]).length;

/** Cautions, each ticked by itself before the act that they stand at. */
export function TickList({ title, legend, hideLegend, items, ticked, onTick }: TickListProps) {
  return (
    <Notice kind="caution" title={title}>
      <SlotGroup legend={legend} hideLegend={hideLegend} flow="column">
        {items.map(({ key, words }) => (
          <Slot
            key={key}
            label={words}
            checked={ticked[key] ?? false}
            onChange={(event) => onTick({ ...ticked, [key]: event.currentTarget.checked })}
          />
        ))}
      </SlotGroup>
    </Notice>
  );
}

export type TickedButtonProps = Pick<TickListProps, "items" | "ticked"> & {
  words: string;
  busy: boolean;
  busyWords: string;
};

/** The button of a form with such cautions: it waits until each is ticked, and says how many are left. */
export function TickedButton({ items, ticked, words, busy, busyWords }: TickedButtonProps) {
  const left = leftToTick(items, ticked);
  return (
    <p className="flex flex-wrap items-center gap-3">
      <Button type="submit" kind="solid" busy={busy} busyWords={busyWords} disabled={left > 0}>
        {words}
      </Button>
      <span className="docket" role="status">
        {left > 0 ? `${left} of ${items.length} still to tick` : "All ticked"}
      </span>
    </p>
  );
}
