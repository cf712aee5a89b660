import type { Metadata } from "next";
import { redirect } from "next/navigation";
import { SignInForm } from "@/components/accounts/sign-in-form";
import { Section } from "@/components/ui/sheet";
import { actorFromPage } from "@/lib/auth/actor";
import { pathAfterSignIn } from "@/lib/client/session-paths";
import { isPerson } from "@/lib/domain/accounts/actor";

export const metadata: Metadata = { title: "Sign in" };

export default async function SignInPage({ searchParams }: { searchParams: Promise<{ to?: string | string[] }> }) {
  const { to } = await searchParams;
  const back = typeof to === "string" ? to : undefined;
  if (isPerson(await actorFromPage())) redirect(pathAfterSignIn(back));
  return (
    <Section id="sign-in" title="Sign in" level={1}>
      <SignInForm to={back} />
    </Section>
  );
}
