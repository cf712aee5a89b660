import { moveByArrows } from "@/components/ui/arrow-keys";
import { Slot } from "@/components/ui/slot";
import type { SentenceChoices } from "./pieces";

export type ChoicesStripProps = {
  part: SentenceChoices;
  /** What is being counted: "designs". */
  countOf: string;
  onChoose: (selected: readonly string[]) => void;
};

/** The choices of one part, each a slot with its count. A choice that fits nothing stays, dimmed, while it is chosen. */
export function ChoicesStrip({ part, countOf, onChoose }: ChoicesStripProps) {
  const choose = (value: string, on: boolean) => {
    const others = part.many ? part.selected.filter((each) => each !== value) : [];
    onChoose(on ? [...others, value] : others);
  };
  return (
    <div className="contents" onKeyDown={(event) => moveByArrows(event, "input[type=checkbox]:not(:disabled)")}>
      {part.options.map((option) => {
        const chosen = part.selected.includes(option.value);
        return (
          <Slot
            key={option.value}
            type={part.many ? "checkbox" : "radio"}
            name={part.name}
            value={option.value}
            label={option.label}
            count={option.count}
            countOf={countOf}
            disabled={option.count === 0 && !chosen}
            checked={chosen}
            onChange={(event) => choose(option.value, event.target.checked)}
          />
        );
      })}
    </div>
  );
}
