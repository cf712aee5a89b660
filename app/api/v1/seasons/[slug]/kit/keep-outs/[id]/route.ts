import { kitSolidParams } from "@/lib/contracts/kit";
import { download } from "@/lib/http/file-answer";
import { route } from "@/lib/http/route";
import { kitSolidStl } from "@/lib/server/kit/kit-solids";

/** Meshes are read anew in a thread for each answer. */
const limits = [{ name: "solids", max: 120, windowS: 60, by: "address" }] as const;

/** One keep-out solid as STL, in cooler coordinates. */
export const GET = route({ access: "public", params: kitSolidParams, limits }, async ({ params }) => {
  const { name, bytes } = await kitSolidStl(params);
  return download(name, "model/stl", bytes);
});
