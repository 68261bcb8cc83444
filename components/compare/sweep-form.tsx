"use client";

import { useMemo, useState } from "react";
import { Button } from "@/components/ui/button";
import { ErrorLine } from "@/components/ui/error-line";
import { NumberField } from "@/components/ui/number-field";
import { Pick } from "@/components/ui/pick";
import { SwitchTwo } from "@/components/ui/switch-two";
import { TextField } from "@/components/ui/text-field";
import { useLine } from "@/lib/client/line-state";
import { formatCount, plural } from "@/lib/format";
import { listRange, readSizes, suggestRange } from "@/lib/sizing/sweep";
import { useSweep } from "./sweep-store";

type Range = { from: number | null; to: number | null; step: number | null };

/** Which buffer, which sizes. */
export function SweepForm() {
  const { parsed, digest, options, selection } = useLine();
  const { start, progress } = useSweep();
  const buffers = useMemo(() => parsed?.nodes.filter((node) => node.kind === "buffer") ?? [], [parsed]);
  const [wanted, setWanted] = useState<string | null>(() => selection[0] ?? null);
  const [way, setWay] = useState<"range" | "list">("range");
  const [typed, setTyped] = useState<Record<string, Range>>({});
  const [list, setList] = useState("");
  const [isTried, setTried] = useState(false);
  const buffer = buffers.find(({ id }) => id === wanted) ?? buffers[0];
  if (!parsed || !digest || !buffer)
    return <p className="text-ink-2">The line has faults and cannot run, so sizes cannot be compared yet.</p>;
  const range = typed[buffer.id] ?? suggestRange(buffer.size);
  const read = way === "range" ? listRange(range.from, range.to, range.step) : readSizes(list);
  const refusal = "refusal" in read ? read.refusal : null;
  const set = (change: Partial<Range>) => setTyped({ ...typed, [buffer.id]: { ...range, ...change } });

  function run() {
    setTried(true);
    if ("sizes" in read && parsed && digest) start(parsed, digest, buffer.id, read.sizes, options);
  }

  return (
    <div>
      <div className="flex flex-wrap items-end gap-x-3 gap-y-2">
        <h2 className="mr-1 flex h-8 items-center text-xl font-title tracking-[-.01em]">What each step of</h2>
        <Pick
          label="Buffer"
          value={buffer.id}
          options={buffers.map(({ id, name }) => ({ value: id, label: name }))}
          onChange={setWanted}
        />
        <span className="flex h-8 items-center text-xl font-title">buys</span>
        <SwitchTwo<"range" | "list">
          label="How sizes are chosen"
          value={way}
          onChange={setWay}
          options={[
            { value: "range", label: "Range" },
            { value: "list", label: "By hand" },
          ]}
        />
        {way === "range" ? (
          <>
            <NumberField
              className="w-28"
              label="From"
              unit="units"
              isWhole
              value={range.from}
              onChange={(from) => set({ from })}
            />
            <NumberField
              className="w-28"
              label="To"
              unit="units"
              isWhole
              value={range.to}
              onChange={(to) => set({ to })}
            />
            <NumberField
              className="w-28"
              label="Step"
              unit="units"
              isWhole
              value={range.step}
              onChange={(step) => set({ step })}
            />
          </>
        ) : (
          <TextField
            className="w-80"
            isTyped
            label="Sizes, units"
            placeholder="900, 1200, 1500"
            value={list}
            onChange={setList}
          />
        )}
        <Button kind="main" disabled={progress !== null} onClick={run}>
          {"sizes" in read ? `Run ${formatCount(read.sizes.length)} ${plural(read.sizes.length, "size")}` : "Run sizes"}
        </Button>
      </div>
      {refusal && (isTried || way === "range") && <ErrorLine className="mt-2">{refusal}</ErrorLine>}
    </div>
  );
}
