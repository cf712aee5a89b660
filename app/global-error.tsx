"use client";

/** When even the frame of the page can't be made. It stands alone, so it leans on nothing. */
export default function GlobalError({ reset }: { error: Error & { digest?: string }; reset: () => void }) {
  return (
    <html lang="en">
      <body>
        <main>
          <h1>This page didn&apos;t work</h1>
          <p>The fault is ours. Nothing that you sent before is lost.</p>
          <p>
            <button type="button" onClick={reset}>
              Try again
            </button>
          </p>
        </main>
      </body>
    </html>
  );
}
