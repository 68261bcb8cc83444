"use client";

import { useMemo, useState } from "react";
import { FanChart } from "@/components/charts/fan-chart";
import { Button } from "@/components/ui/button";
import { ErrorLine } from "@/components/ui/error-line";
import { Pick } from "@/components/ui/pick";
import { type Reading, useLine } from "@/lib/client/line-state";
import { useJob } from "@/lib/client/use-job";
import { useMediaQuery } from "@/lib/client/use-media-query";
import { useSimulation } from "@/lib/client/use-simulation";
import { formatCount } from "@/lib/format";
import { fanOf } from "./fan";
import { Running } from "./running";

type Drawn = { key: string; name: string; weeks: ReturnType<typeof fanOf> };

/** Lowest stock of each week for one buffer, over the replications; run again from the seed when asked for. */
export function LowestStock({ reading }: { reading: Reading }) {
  const { parsed, digest } = useLine();
  const client = useSimulation();
  const isNarrow = useMediaQuery("(max-width: 639px)");
  const buffers = useMemo(() => parsed?.nodes.filter((node) => node.kind === "buffer") ?? [], [parsed]);
  const [wanted, setWanted] = useState<string | null>(null);
  const { state, start, cancel } = useJob<number, Drawn>();
  const buffer = buffers.find(({ id }) => id === wanted) ?? buffers[0];
  if (!parsed || !buffer) return null;
  const { warmupWeeks, ...rest } = reading.result.options;
  const options = { warmupWeeks, ...rest };
  const key = JSON.stringify([digest, options, buffer.id]);
  const isOther = state.status === "done" && state.value.key !== key;

  const run = () =>
    start(0, async (signal, onProgress) => {
      const levels = await client.lowestLevels(parsed, options, buffer.id, {
        signal,
        onProgress: ({ replications, total }) => onProgress(replications / total),
      });
      return { key, name: buffer.name, weeks: fanOf(levels) };
    });

  return (
    <figure>
      <div className="flex flex-wrap items-center gap-x-3 gap-y-1">
        <h2 className="figure-title">Lowest stock in the week</h2>
        <Pick
          label="of"
          value={buffer.id}
          options={buffers.map(({ id, name }) => ({ value: id, label: name }))}
          onChange={(id) => {
            setWanted(id);
            cancel();
          }}
        />
        <span className="ml-auto text-s text-ink-3">units, from the start</span>
      </div>
      {state.status === "done" && (
        <FanChart
          width={isNarrow ? 400 : 520}
          weeks={state.value.weeks}
          nWarmup={warmupWeeks}
          label={describeFan(state.value.name, state.value.weeks)}
        />
      )}
      {state.status === "running" && (
        <Running className="py-4" share={state.progress} replications={options.replications} onCancel={cancel} />
      )}
      {state.status === "failed" && (
        <ErrorLine className="py-2">The stock could not be worked out: {state.message}</ErrorLine>
      )}
      {(state.status === "idle" || state.status === "failed" || isOther) && (
        <div className="py-3">
          <p className="text-s text-ink-3">
            {isOther
              ? "The line has changed since this was drawn."
              : "Worked out when asked for, from the seed phrase: nothing of it is stored."}
          </p>
          <Button size="small" className="mt-2" onClick={() => void run()}>
            {isOther ? "Draw again" : `Draw ${buffer.name}`}
          </Button>
        </div>
      )}
      {state.status === "done" && (
        <figcaption className="text-s text-ink-3">
          Ruled P5 to P95, washed P10 to P90, solid P25 to P75, line: median, over {formatCount(options.replications)}{" "}
          replications.
        </figcaption>
      )}
    </figure>
  );
}

function describeFan(name: string, weeks: ReturnType<typeof fanOf>): string {
  const last = weeks[weeks.length - 1];
  if (!last) return `${name}: no weeks`;
  return `Lowest weekly stock of ${name}: in the last week median ${formatCount(last.p50)}, P10 ${formatCount(last.p10)}, P90 ${formatCount(last.p90)}`;
}
