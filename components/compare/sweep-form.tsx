"use client";

import { useMemo, useState } from "react";
import { Button } from "@/components/ui/button";
import { ErrorLine } from "@/components/ui/error-line";
import { NumberField } from "@/components/ui/number-field";
import { SwitchTwo } from "@/components/ui/switch-two";
import { TextField } from "@/components/ui/text-field";
import { useLine } from "@/lib/client/line-state";
import { formatCount, plural } from "@/lib/format";
import type { Line } from "@/lib/line/types";
import { type Quantity, readQuantity, withQuantity } from "@/lib/sizing/quantities";
import { factorOf, listRange, mostRuns, mostSeconds, readSizes, suggestRange } from "@/lib/sizing/sweep";
import { type Chosen, chooseQuantity, otherThan, QuantityPicks, wholeLine } from "./quantity-picks";
import { useSweep, type Varied } from "./sweep-store";
import { kindOf, showBare } from "./sweep-values";

type Range = { from: number | null; to: number | null; step: number | null };
/** Which number, and which values of it; a second one beside it if wanted. */
export function SweepForm() {
  const { parsed, digest, options, selection } = useLine();
  const { start, progress } = useSweep();
  const [wanted, setWanted] = useState<Chosen | null>(() => (selection[0] ? { node: selection[0], path: "" } : null));
  const [second, setSecond] = useState<(Chosen & { text: string }) | null>(null);
  const [way, setWay] = useState<"range" | "list">("range");
  const [typed, setTyped] = useState<Record<string, Range>>({});
  const [list, setList] = useState("");
  const [isTried, setTried] = useState(false);
  const first = useMemo(() => parsed && chooseQuantity(parsed, wanted), [parsed, wanted]);
  const other = useMemo(() => parsed && second && chooseQuantity(parsed, second), [parsed, second]);
  const asked = useMemo(() => {
    if (!parsed || !first) return null;
    const kind = kindOf(first);
    const range = typed[keyOf(first)] ?? suggestRange(readQuantity(parsed, first), kind);
    const read = way === "range" ? listRange(range.from, range.to, range.step, kind) : readSizes(list, kind);
    const besides = second && other ? readSizes(second.text, kindOf(other), mostSeconds) : null;
    return { range, read, besides, refusal: findRefusal(parsed, first, read, other, besides) };
  }, [first, list, other, parsed, second, typed, way]);
  if (!parsed || !digest || !first || !asked)
    return <p className="text-ink-2">The line has faults and cannot run, so nothing can be compared yet.</p>;
  const { range, read, besides, refusal } = asked;
  const kind = kindOf(first);
  const key = keyOf(first);
  const nRuns = ("sizes" in read ? read.sizes.length : 0) * (besides && "sizes" in besides ? besides.sizes.length : 1);
  const set = (change: Partial<Range>) => setTyped({ ...typed, [key]: { ...range, ...change } });
  const isSize = first.path === "size";

  function run() {
    setTried(true);
    if (!parsed || !digest || !first || refusal || !("sizes" in read)) return;
    const vary = (quantity: Quantity, values: readonly number[]): Varied => ({
      quantity,
      values,
      nodeName: parsed.nodes.find(({ id }) => id === quantity.node)?.name ?? "Whole line",
    });
    const beside = other && besides && "sizes" in besides ? vary(other, besides.sizes) : null;
    start(parsed, digest, vary(first, read.sizes), beside, options);
  }

  return (
    <div>
      <div className="flex flex-wrap items-end gap-x-3 gap-y-2">
        <h2 className="mr-1 flex h-8 items-center text-xl font-title tracking-[-.01em]">What each step of</h2>
        <QuantityPicks line={parsed} chosen={first} onChoose={setWanted} label="Of" />
        <span className="flex h-8 items-center text-xl font-title">buys</span>
        <SwitchTwo<"range" | "list">
          label="How values are chosen"
          value={way}
          onChange={setWay}
          options={[
            { value: "range", label: "Range" },
            { value: "list", label: "By hand" },
          ]}
        />
        {way === "range" ? (
          (["from", "to", "step"] as const).map((field) => (
            <NumberField
              key={`${key} ${field}`}
              className="w-28"
              label={{ from: "From", to: "To", step: "Step" }[field]}
              unit={first.unit}
              factor={factorOf(first)}
              isWhole={kind.isWhole}
              value={range[field]}
              onChange={(value) => set({ [field]: value })}
            />
          ))
        ) : (
          <TextField
            className="w-80"
            isTyped
            label={isSize ? "Sizes, units" : `Values${first.unit && `, ${first.unit}`}`}
            placeholder={isSize ? "900, 1200, 1500" : exampleOf(parsed, first)}
            value={list}
            onChange={setList}
          />
        )}
        <Button kind="main" disabled={progress !== null} onClick={run}>
          {nRuns > 0 && !refusal
            ? `Run ${formatCount(nRuns)} ${isSize && !second ? plural(nRuns, "size") : plural(nRuns, "value")}`
            : isSize
              ? "Run sizes"
              : "Run values"}
        </Button>
      </div>
      <div className="mt-2 flex flex-wrap items-end gap-x-3 gap-y-2">
        {second && other ? (
          <>
            <span className="flex h-8 items-center">each with</span>
            <QuantityPicks
              line={parsed}
              chosen={other}
              onChoose={(chosen) => setSecond({ ...chosen, text: "" })}
              label="And of"
            />
            <TextField
              className="w-64"
              isTyped
              label={`at up to ${mostSeconds} values${other.unit && `, ${other.unit}`}`}
              placeholder={exampleOf(parsed, other)}
              value={second.text}
              onChange={(text) => setSecond({ ...second, text })}
            />
            <Button kind="bare" size="small" onClick={() => setSecond(null)}>
              Leave it out
            </Button>
          </>
        ) : (
          <Button kind="bare" size="small" onClick={() => setSecond({ ...otherThan(parsed, first), text: "" })}>
            Vary a second number as well
          </Button>
        )}
      </div>
      {refusal && (isTried || (way === "range" && !second)) && <ErrorLine className="mt-2">{refusal}</ErrorLine>}
    </div>
  );
}

const keyOf = ({ node, path }: Quantity) => `${node ?? wholeLine} ${path}`;

function exampleOf(line: Line, quantity: Quantity): string {
  const { from, to, step } = suggestRange(readQuantity(line, quantity), kindOf(quantity));
  return [from, from + step, to].map((value) => showBare(value, quantity.unit).replaceAll("\u202f", "")).join(", ");
}

type Read = { sizes: number[] } | { refusal: string };

/** Why this cannot be run, or null; the values are tried on the line one by one. */
function findRefusal(
  line: Line,
  first: Quantity,
  read: Read,
  other: Quantity | null,
  besides: Read | null,
): string | null {
  if ("refusal" in read) return read.refusal;
  if (besides && "refusal" in besides) return besides.refusal;
  if (other && other.node === first.node && other.path === first.path)
    return "Choose two different numbers, or leave the second one out.";
  const nRuns = read.sizes.length * (besides?.sizes.length ?? 1);
  if (nRuns > mostRuns) return `${formatCount(nRuns)} runs are too many: at most ${mostRuns}. Use fewer values.`;
  try {
    for (const value of read.sizes) withQuantity(line, first, value);
    for (const value of besides?.sizes ?? []) withQuantity(line, other!, value);
  } catch (error) {
    if (error instanceof RangeError) return error.message;
    throw error;
  }
  return null;
}
