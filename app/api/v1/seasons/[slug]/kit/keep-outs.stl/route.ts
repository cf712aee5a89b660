import { seasonParams } from "@/lib/contracts/seasons";
import { download } from "@/lib/http/file-answer";
import { route } from "@/lib/http/route";
import { kitSolidsStl } from "@/lib/server/kit/kit-solids";

/** Meshes are read anew in a thread for each answer. */
const limits = [{ name: "solids", max: 120, windowS: 60, by: "address" }] as const;

/** All keep-out solids of a season's bench in one STL. */
export const GET = route({ access: "public", params: seasonParams, limits }, async ({ params }) => {
  const { name, bytes } = await kitSolidsStl(params);
  return download(name, "model/stl", bytes);
});
