import type { Metadata, Viewport } from "next";
import { cookies } from "next/headers";
import { Suspense, type ReactNode } from "react";
import { SignOutButton } from "@/components/accounts/sign-out-button";
import { AccountMenu, type AccountLink } from "@/components/shell/account-menu";
import { Foot } from "@/components/shell/foot";
import { QueryProvider } from "@/components/shell/query-provider";
import { SkipLink, Strip } from "@/components/shell/strip";
import { themeCookie, themeFromCookie } from "@/components/shell/theme";
import { Sheet } from "@/components/ui/sheet";
import { actorFromPage } from "@/lib/auth/actor";
import { isPerson } from "@/lib/domain/accounts/actor";
import { may, type Permission } from "@/lib/domain/accounts/policy";
import { isDemo } from "@/lib/server/demo-mail";
import { fontClass } from "./fonts";
import "./globals.css";

export const metadata: Metadata = {
  title: { default: "Fanfold: bench comparisons of printed cooling fans", template: "%s · Fanfold" },
  description: "Printed cooling fans, measured on one bench against one baseline: how loud, how cool, and how sure.",
  icons: { icon: { url: "/icon.svg", type: "image/svg+xml" } },
};

export const viewport: Viewport = {
  themeColor: [
    { media: "(prefers-color-scheme: light)", color: "#d9d8cf" },
    { media: "(prefers-color-scheme: dark)", color: "#050a07" },
  ],
};

const demoNote = "Demo: every design, person and figure is invented. Letters that it sends are kept at /demo/mail.";

const accountLinks: readonly AccountLink[] = [
  { href: "/my/designs", word: "My designs" },
  { href: "/my/comparisons", word: "Saved comparisons" },
  { href: "/my/searches", word: "Saved searches" },
  { href: "/review", word: "Review" },
  { href: "/my/account", word: "Account" },
];

/** Words of the strip that only some see; the pages behind them ask again. */
const furtherWords: readonly { permission: Permission; href: string; word: string }[] = [
  { permission: "bench.read", href: "/bench", word: "Bench" },
  { permission: "season.manage", href: "/host", word: "Host" },
];

export default async function RootLayout({ children }: { children: ReactNode }) {
  const theme = themeFromCookie((await cookies()).get(themeCookie)?.value);
  const actor = await actorFromPage();
  const handle = isPerson(actor) ? actor.handle : undefined;
  const moreWords = furtherWords.filter(({ permission }) => may(actor, permission));
  return (
    <html lang="en" className={fontClass} data-theme={theme === "system" ? undefined : theme}>
      <body>
        <QueryProvider>
          <SkipLink />
          <Sheet>
            <Strip
              moreWords={moreWords}
              account={<AccountMenu handle={handle} links={accountLinks} signOut={<SignOutButton />} />}
            />
            <main id="main" tabIndex={-1} className="perforated outline-none">
              {children}
            </main>
            <Suspense>
              <Foot theme={theme} note={isDemo() ? demoNote : undefined} />
            </Suspense>
          </Sheet>
        </QueryProvider>
      </body>
    </html>
  );
}
