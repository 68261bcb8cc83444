import { memo } from "react";
import { StaffGauge } from "@/components/charts/staff-gauge";
import { TimeBar } from "@/components/charts/time-bar";
import { cx } from "@/components/ui/cx";
import { WarnIcon } from "@/components/ui/icons";
import { formatCount, formatNumber, formatPercent } from "@/lib/format";
import type { DraftNode, DraftOf } from "@/lib/line/types";
import { factsOf, type NodeReading } from "./node-reading";
import { gauge, station } from "@/lib/line/sheet-sizes";

export type Inlet = { id: string; name: string };

export type NodeDrawingProps = {
  node: DraftNode;
  reading: NodeReading;
  /** Of a station with several inputs: their buffers from top to bottom. */
  inlets: readonly Inlet[];
  formerSize?: number | null;
  fault?: string;
  onSizeChange?(size: number): void;
};

/** One node as the sheet draws it, at its fixed size. */
export const NodeDrawing = memo(function NodeDrawing(props: NodeDrawingProps) {
  const { node, fault } = props;
  return (
    <>
      {node.kind === "buffer" && <BufferDrawing {...props} node={node} />}
      {node.kind === "station" && <StationDrawing {...props} node={node} />}
      {(node.kind === "supplier" || node.kind === "customer") && <QuayDrawing node={node} />}
      {fault && (
        <span className="absolute -top-2.5 right-0 bg-paper text-silt-600" title={fault}>
          <WarnIcon width={17} height={16} />
        </span>
      )}
    </>
  );
});

function BufferDrawing({ node, reading, formerSize, onSizeChange }: NodeDrawingProps & { node: DraftOf<"buffer"> }) {
  const { levels, dry } = reading;
  return (
    <>
      <span className="absolute inset-x-1 top-0 flex h-[33px] items-end">
        <b className="line-clamp-2 text-[12.5px]/[15px] font-[620] [overflow-wrap:anywhere]" title={node.name}>
          {node.name}
        </b>
      </span>
      <span className="absolute" style={{ left: gauge.x, top: gauge.y - 5 }}>
        <StaffGauge
          size={node.size}
          levels={levels}
          isPurchased={node.replenishment !== null}
          dry={dry}
          formerSize={formerSize}
          width={gauge.bay}
          height={gauge.depth}
          onSizeChange={onSizeChange}
          label={node.name}
        />
      </span>
      <span className="absolute top-[38px] left-[60px] text-[12.5px]/[17px] whitespace-nowrap">
        <b className="block font-[640]">{node.size === null ? "?" : formatCount(node.size)}</b>
        {dry !== null && (
          <span className={cx("sheet-detail", dry >= 0.01 ? "font-[560] text-silt-700" : "text-ink-2")}>
            dry {formatPercent(dry)}
          </span>
        )}
      </span>
    </>
  );
}

function StationDrawing({ node, reading, inlets }: NodeDrawingProps & { node: DraftOf<"station"> }) {
  const worst = Math.max(0.05, ...inlets.map(({ id }) => reading.waits[id] ?? 0));
  return (
    <span className="absolute inset-0 border border-ink bg-sheet">
      <span aria-hidden className="absolute -inset-x-px -top-px h-1 border-b border-paper bg-ink" />
      <span className="absolute inset-x-2.5 top-[7px]">
        <b className="line-clamp-2 text-[12.5px]/[15px] font-[620] [overflow-wrap:anywhere]" title={node.name}>
          {node.name}
        </b>
        <span className="sheet-detail block truncate text-[12px]/[16px] text-ink-2">{factsOf(node)}</span>
      </span>
      {inlets.length > 1 &&
        inlets.map(({ id, name }, i) => (
          <span
            key={id}
            className="absolute inset-x-2.5 text-[12px]/[15px]"
            style={{ top: station.head + i * station.inlet + 2 }}
          >
            <b className="block truncate font-[560]">{name}</b>
            {reading.waits[id] !== undefined && (
              <span
                className={cx(
                  "sheet-detail block",
                  reading.waits[id] >= worst ? "font-[560] text-silt-700" : "text-ink-3",
                )}
              >
                waits {formatNumber(reading.waits[id], 1)} h a week
              </span>
            )}
          </span>
        ))}
      {reading.shares && (
        <span className="absolute inset-x-2.5 bottom-2">
          <TimeBar shares={reading.shares} width={station.width - 22} label={node.name} />
        </span>
      )}
    </span>
  );
}

/** A quay: open to where material comes from or goes, walled where it meets the line. */
function QuayDrawing({ node }: { node: DraftOf<"supplier"> | DraftOf<"customer"> }) {
  const isSupplier = node.kind === "supplier";
  return (
    <span className="absolute inset-0 border-y border-ink-2">
      <span aria-hidden className={cx("absolute -inset-y-px w-1 bg-ink", isSupplier ? "right-0" : "left-0")} />
      <span
        className={cx(
          "absolute inset-y-0 flex flex-col justify-center",
          isSupplier ? "right-3 left-0" : "right-0 left-3",
        )}
      >
        <span
          className={cx("line-clamp-2 text-[12.5px]/[15px] [overflow-wrap:anywhere]", isSupplier ? "" : "font-[620]")}
          title={node.name}
        >
          {node.name}
        </span>
        <span className="sheet-detail truncate text-[12px]/[16px] text-ink-2">{factsOf(node)}</span>
      </span>
    </span>
  );
}
