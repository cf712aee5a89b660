import type { ReactNode } from "react";
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
