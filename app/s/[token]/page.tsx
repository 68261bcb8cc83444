import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { connection } from "next/server";
import { cache } from "react";
import { PlainPage } from "@/components/layout/plain-page";
import { SharedSheet } from "@/components/shared-page/shared-sheet";
import { getDb } from "@/db/client";
import { findSharedPage, findSharedResult } from "@/db/queries/shares";
import { decodeResult } from "@/lib/simulation";

// One view is counted for each time that the page is asked for.
const readPage = cache(async (token: string) => {
  await connection();
  return findSharedPage(await getDb(), token);
});

export async function generateMetadata({ params }: PageProps<"/s/[token]">): Promise<Metadata> {
  const { token } = await params;
  const page = await readPage(token);
  return {
    title: "gone" in page ? "Shared figures" : page.lineName,
    robots: { index: false, follow: false },
    referrer: "no-referrer",
  };
}

/** What the holder of a link reads: no session, nothing to press but to look closer. */
export default async function SharedPageRoute({ params }: PageProps<"/s/[token]">) {
  const { token } = await params;
  const page = await readPage(token);
  if ("gone" in page) {
    if (page.gone === "unknown") notFound();
    return (
      <PlainPage
        title={page.gone === "expired" ? "This link has expired" : "This link was revoked"}
        action={<span className="text-ink-2">Ask whoever sent it for a new one.</span>}
      >
        Its figures can no longer be read here.
      </PlainPage>
    );
  }
  const db = await getDb();
  const results = await Promise.all(
    page.versions.map(async (_, position) => {
      const bytes = await findSharedResult(db, token, position);
      return bytes instanceof Uint8Array ? decodeResult(bytes) : null;
    }),
  );
  return <SharedSheet page={page} results={results} />;
}
