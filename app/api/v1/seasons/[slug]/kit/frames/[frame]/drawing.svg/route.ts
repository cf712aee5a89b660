import { kitFrameParams } from "@/lib/contracts/kit";
import { download } from "@/lib/http/file-answer";
import { route } from "@/lib/http/route";
import { kitSvg } from "@/lib/server/kit/kit-drawing";

/** The frame's dimensioned drawing as SVG in true size. */
export const GET = route({ access: "public", params: kitFrameParams }, async ({ params }) => {
  const { name, text } = await kitSvg(params);
  return download(name, "image/svg+xml", text);
});
