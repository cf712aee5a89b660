import type { Metadata } from "next";
import { StudyPage } from "@/components/study/study-page";
import { parseStudyQuestion, studyAddress } from "@/lib/contracts/study-question";
import { traitOf } from "@/lib/domain/study/traits";
import { readStudy, readStudyChoices } from "@/lib/server/study/read-study";

type Asked = { searchParams: Promise<Record<string, string | string[] | undefined>> };

async function paramsOf({ searchParams }: Asked): Promise<URLSearchParams> {
  const pairs = Object.entries(await searchParams).flatMap(([name, value]) =>
    (Array.isArray(value) ? value : [value]).flatMap((each) => (each === undefined ? [] : [[name, each]])),
  );
  return new URLSearchParams(pairs);
}

export async function generateMetadata(asked: Asked): Promise<Metadata> {
  const question = parseStudyQuestion(await paramsOf(asked));
  const named = [question.trait, question.by].flatMap((key) => (key ? [traitOf(key).label] : []));
  return {
    title: named.length > 0 ? `Traits: ${named.join(" × ")}` : "Traits",
    description: "Which traits of printed cooling fans scored well: pairs that differ in one, effects with intervals.",
    alternates: { canonical: studyAddress(question) },
  };
}

export default async function TraitsPage(asked: Asked) {
  const params = await paramsOf(asked);
  const [answer, choices] = await Promise.all([readStudy(parseStudyQuestion(params)), readStudyChoices()]);
  return <StudyPage answer={answer} choices={choices} open={params.getAll("open").at(-1)} />;
}
