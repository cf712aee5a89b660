import { parseStudyQuestion, studyTableQuery } from "@/lib/contracts/study-question";
import { route } from "@/lib/http/route";
import { studyCsv } from "@/lib/server/study/study-csv";

/** One of the study's tables, or the entries that it rests on, for spreadsheets. */
export const GET = route(
  { access: "public", query: studyTableQuery, limits: [{ name: "study", max: 120, windowS: 60 }] },
  async ({ query, request }) => {
    const question = parseStudyQuestion(new URL(request.url).searchParams);
    const { name, text } = await studyCsv(question, query.table ?? "effects");
    return new Response(text, {
      headers: {
        "content-type": "text/csv; charset=utf-8",
        "content-disposition": `attachment; filename="${name}"`,
        "cache-control": "private, no-store",
        "x-content-type-options": "nosniff",
      },
    });
  },
);
