"use client";

import { useEffect } from "react";
import { PlainPage } from "@/components/layout/plain-page";
import { Button } from "@/components/ui/button";

/** What nobody foresaw. The reference helps to find it in the server's log. */
export default function ErrorPage({ error, reset }: { error: Error & { digest?: string }; reset(): void }) {
  useEffect(() => console.error(error), [error]);
  return (
    <PlainPage title="This page could not be shown" action={<Button onClick={reset}>Try again</Button>}>
      Something went wrong on our side. What was shown as saved is saved.
      {error.digest && <span className="mt-2 block text-s text-ink-3">Reference {error.digest}</span>}
    </PlainPage>
  );
}
