import type { Metadata } from "next";
import { LinkButton } from "@/components/ui/button";
import { Section } from "@/components/ui/sheet";
import { ForbiddenState } from "@/components/ui/states";

export const metadata: Metadata = { title: "Not for this account" };

export default function Forbidden() {
  return (
    <Section id="forbidden" title="Not for this account" level={1}>
      <ForbiddenState
        title="Your role doesn't open this page"
        action={<LinkButton href="/">To the first page</LinkButton>}
      >
        The host gives roles. If you should have one, ask them.
      </ForbiddenState>
    </Section>
  );
}
