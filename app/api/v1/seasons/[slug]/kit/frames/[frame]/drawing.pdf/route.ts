import { kitFrameParams } from "@/lib/contracts/kit";
import { download } from "@/lib/http/file-answer";
import { route } from "@/lib/http/route";
import { kitPdf } from "@/lib/server/kit/kit-pdf";

/** The frame's dimensioned drawing as PDF on A4. */
export const GET = route({ access: "public", params: kitFrameParams }, async ({ params }) => {
  const { name, bytes } = await kitPdf(params);
  return download(name, "application/pdf", Uint8Array.from(bytes));
});
