import { Fold } from "@/components/ui/fold";
import type { StudyAnswer } from "@/lib/contracts/study";
import { traitOf } from "@/lib/domain/study/traits";
import { formatNumber } from "@/lib/format/numbers";
import { countWords, listWords } from "@/lib/format/words";
import { againstWords, figureWords } from "./study-words";

function errorWords({ errors, designers, draws }: StudyAnswer["result"]["fit"]): string {
  if (errors === "cluster-t")
    return `Designers are clusters: ${designers} of them, so errors are cluster-robust (CR1) and intervals by t on ${designers - 1} degrees of freedom.`;
  if (errors === "wild-bootstrap")
    return `Designers are clusters: ${designers} of them, fewer than thirty, so p and intervals come from a wild cluster bootstrap with the null imposed (${formatNumber(draws ?? 0)} draws of a sign a designer).`;
  return "There is no fit to take errors from.";
}

/** The model, stated: what is regressed on what, what is left out, how errors are formed. */
export function ModelNote({ question, result }: Pick<StudyAnswer, "question" | "result">) {
  const { fit, modelTraits, tried } = result;
  const { unit, short } = figureWords[question.figure];
  const left = unit === "%" ? `ln(${short} of the baseline)` : `${short} less the baseline’s, in dB`;
  const kinds = [
    ...new Map(
      fit.effects.flatMap((effect) => {
        const against = againstWords(effect);
        return against ? [[effect.trait, `${traitOf(effect.trait).label} ${against}`] as const] : [];
      }),
    ).values(),
  ];
  return (
    <Fold title="The model" className="mt-2">
      <div className="grid max-w-3xl gap-2">
        <p>
          {left} = a level of its own for each season × bench version × protocol × baseline unit (
          {countWords(fit.cells, "cell")}) +{" "}
          {listWords(
            modelTraits.map((key) => traitOf(key).label),
            "and",
          )}
          , least squares. Only differences within a cell count, so seasons and benches are never put on one scale.
          {unit === "%" ? " An effect β is shown as 100(e^β − 1) %." : ""}
        </p>
        {kinds.length > 0 ? <p>Kinds are said against one of them: {kinds.join("; ")}.</p> : null}
        <p>
          {errorWords(fit)} Adjusted p: Benjamini and Hochberg over the {tried} that were tried on this page, pairs
          included.
        </p>
        <p>
          {countWords(fit.n, "entry", "entries")} are in it
          {fit.leftOut > 0
            ? `; ${fit.leftOut} aren’t, for want of a trait or the figure, or because fewer than four share a kind`
            : ""}
          {fit.dof === undefined ? "" : `; ${fit.dof} degrees of freedom are left`}. An effect is refused where no cell
          holds entries that differ in it, or where the other traits say the same (variance inflation over 10).
        </p>
      </div>
    </Fold>
  );
}
