import type { Metadata } from "next";
import { LetterText } from "@/components/accounts/letter-text";
import { EmptyState } from "@/components/ui/states";
import { Section } from "@/components/ui/sheet";
import { orPageState } from "@/lib/auth/page";
import { readDemoMail } from "@/lib/server/demo-mail";

export const metadata: Metadata = { title: "Letters of the demo", referrer: "no-referrer", robots: { index: false } };

export default async function DemoMailPage({ searchParams }: { searchParams: Promise<{ to?: string | string[] }> }) {
  const { to } = await searchParams;
  const letters = await orPageState(readDemoMail(typeof to === "string" ? to : undefined), "/demo/mail");
  return (
    <Section id="letters" title="Letters of the demo" level={1} note="Kept on this machine; none was delivered.">
      {letters.length === 0 ? <EmptyState title="No letter yet">Sign up, and one comes.</EmptyState> : null}
      <ol className="grid gap-6">
        {letters.map((letter) => (
          <li key={letter.id}>
            <h2>{letter.subject}</h2>
            <p className="docket wrap-anywhere">
              to {letter.to.join(", ")}
              {letter.sentAt ? ` · ${letter.sentAt}` : ""}
            </p>
            <LetterText text={letter.text} />
          </li>
        ))}
      </ol>
    </Section>
  );
}
