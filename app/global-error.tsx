"use client";

import "./globals.css";

/** Stands in for the whole document when even the frame fails. */
export default function GlobalError({ reset }: { error: Error; reset(): void }) {
  return (
    <html lang="en">
      <body>
        <main className="mx-auto max-w-[560px] px-5 py-16">
          <h1 className="text-2xl font-title">Forebay could not be shown</h1>
          <p className="mt-2 text-l text-ink-2">Something went wrong on our side. What was shown as saved is saved.</p>
          <button type="button" className="mt-6 rounded-press border border-rule-2 px-4 py-2" onClick={reset}>
            Try again
          </button>
        </main>
      </body>
    </html>
  );
}
