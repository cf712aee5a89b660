import type { SentenceChoices, SentencePiece } from "@/components/ui/sentence/pieces";
import type { StudyChoices } from "@/lib/contracts/study";
import type { StudyQuestion } from "@/lib/contracts/study-question";
import { outcomeKeys } from "@/lib/domain/study/outcomes";
import { traitKeys, traitOf, type TraitKey } from "@/lib/domain/study/traits";
import { listWords } from "@/lib/format/words";
import { figureWords } from "./study-words";

const text = (words: string): SentencePiece => ({ kind: "text", text: words });
const lowered = (label: string) => label.charAt(0).toLowerCase() + label.slice(1);
const traitWords = (key: TraitKey) => lowered(traitOf(key).label);

type Part = Omit<SentenceChoices, "kind" | "selected" | "any"> & { selected: readonly string[] };

function part({ selected, ...rest }: Part): SentenceChoices {
  return { kind: "choices", any: selected.length === 0, selected, ...rest };
}

function traitPart(name: "trait" | "by", chosen: TraitKey | null, without: TraitKey | null): SentenceChoices {
  return part({
    name,
    label: name === "trait" ? "Trait" : "Second trait, against the first",
    words: chosen ? traitWords(chosen) : name === "trait" ? "every trait" : "no second trait",
    many: false,
    options: traitKeys.filter((key) => key !== without).map((key) => ({ value: key, label: traitOf(key).label })),
    selected: chosen ? [chosen] : [],
  });
}

const chosenLabels = (options: StudyChoices["frames"], selected: readonly string[]) =>
  listWords(
    selected.map((value) => options.find((option) => option.value === value)?.label ?? value),
    "or",
  );

/** "How blades × inlet stack go with ΔT/P at equal noise, on a frame of 120 mm, in the last two seasons." */
export function studyPieces(question: StudyQuestion, choices: StudyChoices): SentencePiece[] {
  const { trait, by, figure, frames, rotations, season } = question;
  const seasonLabel = choices.seasons.find(({ value }) => value === season)?.label ?? season;
  return [
    text("How "),
    traitPart("trait", trait, null),
    ...(trait ? [text(" × "), traitPart("by", by, trait)] : []),
    text(by ? " go with " : " goes with "),
    {
      ...part({
        name: "figure",
        label: "Figure, against the baseline",
        words: figureWords[figure].spoken,
        many: false,
        options: outcomeKeys.map((key) => ({ value: key, label: figureWords[key].short })),
        selected: [figure],
      }),
      any: figure === "equal",
    },
    text(", on a frame of "),
    part({
      name: "frame",
      label: "Frame",
      words: frames.length > 0 ? chosenLabels(choices.frames, frames) : "any size",
      many: true,
      options: choices.frames,
      selected: frames,
    }),
    text(", with "),
    part({
      name: "rotation",
      label: "Stages",
      words: rotations.length > 0 ? chosenLabels(choices.rotations, rotations) : "any number of",
      many: true,
      options: choices.rotations,
      selected: rotations,
    }),
    text(rotations.length === 1 && rotations[0] === "single" ? " stage, in " : " stages, in "),
    part({
      name: "season",
      label: "Season",
      words: season === "all" ? "every season" : seasonLabel,
      many: false,
      options: choices.seasons,
      selected: season === "all" ? [] : [season],
    }),
    text("."),
  ];
}
