import { parseStudyQuestion, studyQuery } from "@/lib/contracts/study-question";
import { route } from "@/lib/http/route";
import { readStudy } from "@/lib/server/study/read-study";

/** The trait study: the question as the page's address has it, answered as the page shows it. */
export const GET = route(
  { access: "public", query: studyQuery, limits: [{ name: "study", max: 120, windowS: 60 }] },
  async ({ request }) => readStudy(parseStudyQuestion(new URL(request.url).searchParams)),
);
