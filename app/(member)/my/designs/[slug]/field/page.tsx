import type { Metadata } from "next";
import { FieldPage } from "@/components/study/field-page";
import { orPageState, personForPage } from "@/lib/auth/page";
import { outcomeKeys } from "@/lib/domain/study/outcomes";
import { readField } from "@/lib/server/study/read-field";

export const metadata: Metadata = { title: "In its field" };

type Asked = {
  params: Promise<{ slug: string }>;
  searchParams: Promise<{ figure?: string | string[] }>;
};

export default async function MyFieldPage({ params, searchParams }: Asked) {
  const [{ slug }, { figure: asked }] = await Promise.all([params, searchParams]);
  const figure = outcomeKeys.find((key) => key === asked) ?? "equal";
  const path = `/my/designs/${slug}/field`;
  const actor = await personForPage(path);
  const read = await orPageState(readField(actor, { slug, outcome: figure }), path);
  return <FieldPage {...read} figure={figure} />;
}
