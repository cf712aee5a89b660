import type { Metadata, Viewport } from "next";
import { cookies } from "next/headers";
import { Suspense, type ReactNode } from "react";
import { AccountMenu } from "@/components/shell/account-menu";
import { Foot } from "@/components/shell/foot";
import { QueryProvider } from "@/components/shell/query-provider";
import { SkipLink, Strip } from "@/components/shell/strip";
import { themeCookie, themeFromCookie } from "@/components/shell/theme";
import { Sheet } from "@/components/ui/sheet";
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

export default async function RootLayout({ children }: { children: ReactNode }) {
  const theme = themeFromCookie((await cookies()).get(themeCookie)?.value);
  return (
    <html lang="en" className={fontClass} data-theme={theme === "system" ? undefined : theme}>
      <body>
        <QueryProvider>
          <SkipLink />
          <Sheet>
            <Strip account={<AccountMenu />} />
            <main id="main" tabIndex={-1} className="perforated outline-none">
              {children}
            </main>
            <Suspense>
              <Foot theme={theme} />
            </Suspense>
          </Sheet>
        </QueryProvider>
      </body>
    </html>
  );
}
