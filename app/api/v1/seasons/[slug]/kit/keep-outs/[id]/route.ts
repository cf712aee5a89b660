import { kitSolidParams } from "@/lib/contracts/kit";
import { download } from "@/lib/http/file-answer";
import { route } from "@/lib/http/route";
import { kitSolidStl } from "@/lib/server/kit/kit-solids";

/** One keep-out solid as STL, in cooler coordinates. */
export const GET = route({ access: "public", params: kitSolidParams }, async ({ params }) => {
  const { name, bytes } = await kitSolidStl(params);
  return download(name, "model/stl", bytes);
});
