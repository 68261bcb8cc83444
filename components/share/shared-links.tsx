"use client";

import { useState } from "react";
import useSWR from "swr";
import { LocalTime } from "@/components/line/local-time";
import { Button } from "@/components/ui/button";
import { ConfirmDialog } from "@/components/ui/confirm-dialog";
import { ErrorLine } from "@/components/ui/error-line";
import { Tag } from "@/components/ui/tag";
import { toast } from "@/components/ui/toast";
import { describeError, fetchJson } from "@/lib/client/api";
import { useLine } from "@/lib/client/line-state";
import { plural } from "@/lib/format";
import type { ShareSummary } from "@/lib/schema/lines";
import { useShareActions } from "./share-actions";

export const sharesKey = (lineId: string) => `/api/lines/${lineId}/shares`;

/** Links made of this line, the newest first. */
export function SharedLinks() {
  const { line } = useLine();
  const { revokeShare } = useShareActions();
  const { data, error, isLoading, mutate } = useSWR<ShareSummary[], Error>(sharesKey(line.id), fetchJson);
  const [asked, setAsked] = useState<ShareSummary | null>(null);
  return (
    <section className="mt-6">
      <h3 className="figure-title border-b border-ink pb-1">Links made of this line</h3>
      {isLoading && (
        <p role="status" className="py-2 text-ink-3">
          Reading the links
        </p>
      )}
      {error && <ErrorLine className="py-2">The links could not be read: {describeError(error)}</ErrorLine>}
      {data?.length === 0 && <p className="py-2 text-ink-3">None yet.</p>}
      <ul>
        {data?.map((share) => (
          <li key={share.id} className="flex flex-wrap items-center gap-x-3 gap-y-1 border-b border-rule py-2">
            <span className="min-w-0 flex-1">
              <b className="block truncate font-[560]">{share.title}</b>
              <span className="text-s text-ink-3">
                <LocalTime at={share.createdAt} format="dateTime" />, {share.createdBy}, {share.nViews}{" "}
                {plural(share.nViews, "view")}
              </span>
            </span>
            <State share={share} />
            {!share.revokedAt && (
              <Button size="small" onClick={() => setAsked(share)}>
                Revoke
              </Button>
            )}
          </li>
        ))}
      </ul>
      <ConfirmDialog
        open={asked !== null}
        onClose={() => setAsked(null)}
        title="Revoke this link?"
        description={`Whoever has the link to “${asked?.title ?? ""}” can no longer open it. This cannot be undone; a new link can be made.`}
        action="Revoke link"
        keep="Keep it"
        onConfirm={async () => {
          if (!asked) return null;
          const result = await revokeShare({ shareId: asked.id });
          if (!result.ok) return result.message;
          await mutate();
          toast("Link revoked.");
          return null;
        }}
      />
    </section>
  );
}

function State({ share: { revokedAt, expiresAt } }: { share: ShareSummary }) {
  const [now] = useState(() => Date.now());
  if (revokedAt) return <Tag tone="silt">revoked</Tag>;
  if (Date.parse(expiresAt) < now) return <Tag>expired</Tag>;
  return (
    <Tag tone="water">
      until{"\u00a0"}
      <LocalTime at={expiresAt} format="date" />
    </Tag>
  );
}
