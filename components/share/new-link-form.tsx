"use client";

import { useState } from "react";
import { useSWRConfig } from "swr";
import { Button } from "@/components/ui/button";
import { ErrorLine } from "@/components/ui/error-line";
import { NumberField } from "@/components/ui/number-field";
import { useLine } from "@/lib/client/line-state";
import { formatCount, plural } from "@/lib/format";
import type { Sweep } from "@/lib/schema/lines";
import { type NewShare, useShareActions } from "./share-actions";
import { sharesKey } from "./shared-links";

type Props = { comparison?: readonly { versionId: string; name: string }[]; sweep: Sweep | null };

/** What a link would freeze; offers to run and keep first where there is nothing to freeze. */
export function NewLinkForm({ comparison = [], sweep }: Props) {
  const { line, scenario, nEditsNotKept } = useLine();
  const { createShare } = useShareActions();
  const { mutate } = useSWRConfig();
  const [days, setDays] = useState<number | null>(30);
  const [url, setUrl] = useState<string | null>(null);
  const [error, setError] = useState<string | null>(null);
  const [isBusy, setBusy] = useState(false);
  const isComparison = comparison.length > 1 || sweep !== null;

  if (!isComparison && !scenario.kept.reading) return <KeepFirst />;

  const areDaysSound = days !== null && Number.isInteger(days) && days >= 1 && days <= 365;

  async function create() {
    if (!areDaysSound) return;
    setBusy(true);
    const share: NewShare = isComparison
      ? {
          kind: "comparison",
          versionIds: comparison.length > 1 ? comparison.map(({ versionId }) => versionId) : [scenario.kept.id],
          ...(sweep ? { sweep } : {}),
          days,
        }
      : { kind: "version", versionIds: [scenario.kept.id], days };
    const result = await createShare(share);
    setBusy(false);
    if (!result.ok) return setError(result.message);
    setError(null);
    setUrl(new URL(result.value.url, window.location.href).href);
    void mutate(sharesKey(line.id));
  }

  if (url) return <CreatedLink url={url} />;
  return (
    <section className="mt-4 border-t border-ink pt-3">
      <p>{describeFrozen(scenario.name, scenario.kept.number, comparison, sweep)}</p>
      {!isComparison && nEditsNotKept > 0 && (
        <p className="caution mt-2 text-ink-2">
          {nEditsNotKept} {plural(nEditsNotKept, "edit")} of the draft {plural(nEditsNotKept, "is", "are")} not kept and
          will not be shown.
        </p>
      )}
      <div className="mt-3 flex items-end gap-3">
        <NumberField
          label="Works for"
          unit="days"
          isWhole
          className="w-36"
          value={days}
          onChange={setDays}
          error={areDaysSound ? undefined : "1 to 365 days."}
        />
        <Button kind="main" disabled={isBusy || !areDaysSound} onClick={() => void create()}>
          Make a link
        </Button>
      </div>
      {error && <ErrorLine className="mt-2">{error}</ErrorLine>}
    </section>
  );
}

function describeFrozen(
  name: string,
  number: number,
  comparison: readonly { name: string }[],
  sweep: Sweep | null,
): string {
  if (comparison.length > 1)
    return `The link shows ${comparison.map((one) => one.name).join(", ")} side by side, as kept now.`;
  const sizes = sweep ? `, with ${formatCount(sweep.rows.length)} sizes of ${sweep.bufferName} compared` : "";
  return `The link shows ${name}, version ${number}, as kept${sizes}. Later edits do not alter it.`;
}

function KeepFirst() {
  const { full, parsed, runFull, keep, progress } = useLine();
  const [error, setError] = useState<string | null>(null);
  return (
    <section className="mt-4 border-t border-ink pt-3">
      <p>There is nothing to share yet: a link shows a kept version with the result of a full run.</p>
      {error && <ErrorLine className="mt-2">{error}</ErrorLine>}
      <div className="mt-3 flex gap-2">
        <Button disabled={!parsed || progress !== null || full?.isCurrent} onClick={runFull}>
          {progress ? "Running" : full?.isCurrent ? "Run done" : "1. Run the full weeks"}
        </Button>
        <Button
          kind="main"
          disabled={!full?.isCurrent}
          onClick={() => void keep().then((result) => setError(result.ok ? null : result.message))}
        >
          2. Keep the result
        </Button>
      </div>
    </section>
  );
}

function CreatedLink({ url }: { url: string }) {
  const [copied, setCopied] = useState<"yes" | "no" | null>(null);
  return (
    <section className="mt-4 border-t border-ink pt-3">
      <p className="font-[620]">The link is made. Its address is shown only now: copy it.</p>
      <div className="mt-2 flex gap-2">
        <input
          readOnly
          aria-label="Address of the link"
          value={url}
          className="typed h-8 min-w-0 flex-1 rounded-field border border-rule-2 bg-sunk px-2 max-sm:h-11"
          onFocus={(event) => event.target.select()}
        />
        <Button
          kind="main"
          className="max-sm:h-11"
          onClick={() =>
            void navigator.clipboard.writeText(url).then(
              () => setCopied("yes"),
              () => setCopied("no"),
            )
          }
        >
          {copied === "yes" ? "Copied" : "Copy"}
        </Button>
      </div>
      {copied === "no" && (
        <ErrorLine className="mt-1">
          The browser did not let it be copied: select the address and copy it by hand.
        </ErrorLine>
      )}
    </section>
  );
}
