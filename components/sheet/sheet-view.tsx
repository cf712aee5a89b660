import { ClipBar } from "@/components/shell/clip-bar";
import type { SheetDrawing } from "@/lib/contracts/drawing";
import type { Sheet } from "@/lib/contracts/sheet";
import { BudgetSection } from "./budget-section";
import { CoolingSection } from "./cooling-section";
import { DrawingSection } from "./drawing-section";
import { FourFigures } from "./four-figures";
import { HistorySection } from "./history-section";
import { OffAxis } from "./off-axis";
import { PrintSection } from "./print-section";
import { QuestionsSection } from "./questions-section";
import { ReadingsSection } from "./readings-section";
import { SheetHead } from "./sheet-head";
import { sheetNumber } from "./sheet-words";
import { SpectrumSection, type SpectrumAsked } from "./spectrum-section";
import { TakeOut } from "./take-out";

export type SheetViewProps = {
  sheet: Sheet;
  /** Made from the mesh; null where none was read. */
  drawn: SheetDrawing | null;
  spectrum?: SpectrumAsked;
};

/** A design's sheet, piece by piece; a piece without data (spectrum, off axis, budget) is absent. */
export function SheetView({ sheet, drawn, spectrum = {} }: SheetViewProps) {
  return (
    <article aria-labelledby="sheet-title">
      <SheetHead sheet={sheet} />
      <FourFigures sheet={sheet} />
      <CoolingSection sheet={sheet} />
      <DrawingSection sheet={sheet} drawn={drawn} />
      <ReadingsSection sheet={sheet} />
      <SpectrumSection sheet={sheet} asked={spectrum} />
      <OffAxis sheet={sheet} />
      <BudgetSection sheet={sheet} />
      <HistorySection sheet={sheet} />
      <PrintSection sheet={sheet} />
      <QuestionsSection sheet={sheet} />
      <TakeOut sheet={sheet} />
      <p className="print-only docket">
        {sheetNumber(sheet.number)} · method {sheet.methodVersion} · publication {sheet.publication.number}
      </p>
      <ClipBar names={{ [sheet.entryId]: `${sheet.name} ${sheet.letter}` }} />
    </article>
  );
}
