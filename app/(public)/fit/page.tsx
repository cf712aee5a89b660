import type { Metadata } from "next";
import { FitDesk } from "@/components/fit/fit-desk";
import { actorFromPage } from "@/lib/auth/actor";
import { readCarryChoices } from "@/lib/server/designs/carry-choices";
import { readFitLimits } from "@/lib/server/reading/fit-limits";

export const metadata: Metadata = {
  title: "Fit a model",
  description:
    "Drop a fan’s STL or 3MF: blades, diameters, fit to the frame, balance and drawing, read in your browser.",
};

/** Limits change with seasons and benches, so the page is made when it is asked for. */
export const dynamic = "force-dynamic";

export default async function FitPage() {
  const [limits, own] = await Promise.all([readFitLimits(), actorFromPage().then(readCarryChoices)]);
  return <FitDesk limits={limits} own={own} />;
}
