"use client";

import dynamic from "next/dynamic";
import { usePathname, useRouter, useSearchParams } from "next/navigation";
import type { Route } from "next";
import { Empty } from "@/components/ui/empty";
import { SwitchTwo } from "@/components/ui/switch-two";
import { useLine } from "@/lib/client/line-state";
import { useMediaQuery } from "@/lib/client/use-media-query";
import { formatCount } from "@/lib/format";
import { dueAWeek, loadsOf } from "@/lib/line/capacity";
import { BarTools } from "./bar-slot";
import { InspectorPanel } from "./inspector/inspector-panel";
import { ReadingForm } from "./reading-form";
import { LineTable } from "./table/line-table";

// The canvas measures the screen: it is drawn in the browser only.
const SheetCanvas = dynamic(() => import("./canvas/sheet-canvas").then((module) => module.SheetCanvas), {
  ssr: false,
  loading: () => <p className="m-auto text-ink-2">Unrolling the sheet</p>,
});

const views = [
  { value: "sheet", label: "Sketch" },
  { value: "table", label: "Table" },
] as const;

/** The line as a drawing or as a table, with the form of what is selected. Narrow screens read and do not draw. */
export function SketchView() {
  const pathname = usePathname();
  const router = useRouter();
  const search = useSearchParams();
  const isWide = useMediaQuery("(min-width: 1024px)");
  const view = search.get("view") === "table" ? "table" : "sheet";

  function show(next: "sheet" | "table") {
    const params = new URLSearchParams(search);
    if (next === "table") params.set("view", "table");
    else params.delete("view");
    router.replace(`${pathname}${params.size > 0 ? `?${params}` : ""}` as Route, { scroll: false });
  }

  if (isWide === null) return null;
  return (
    <>
      {isWide && (
        <BarTools>
          <SwitchTwo label="How the line is shown" value={view} onChange={show} options={views} />
        </BarTools>
      )}
      <BarTools slot="end">
        <Loads />
      </BarTools>
      {!isWide && <ReadingForm />}
      {isWide && view === "table" && <LineTable />}
      {isWide && view === "sheet" && <Sheet />}
    </>
  );
}

function Sheet() {
  const { document, notes } = useLine();
  return (
    <div className="flex min-h-0 flex-1">
      <div className="relative flex min-w-0 flex-1 flex-col">
        <SheetCanvas />
        {document.nodes.length === 0 && notes.length === 0 && <EmptySheet />}
      </div>
      <InspectorPanel />
    </div>
  );
}

function EmptySheet() {
  const { mayEdit } = useLine();
  return (
    <div className="pointer-events-none absolute inset-0 grid place-items-center p-6">
      <div className="pointer-events-auto bg-paper">
        <Empty title="Nothing is drawn yet">
          {mayEdit
            ? "Begin with what leaves the plant: add a customer (key C), a buffer of finished goods (B) and the station that fills it (T). Then draw channels from port to port."
            : "An engineer or owner of this workspace can draw the line."}
        </Empty>
      </div>
    </div>
  );
}

/** What is due a week, and the station with the least time to spare. */
function Loads() {
  const { document, parsed } = useLine();
  const due = dueAWeek(document);
  const tightest = parsed && loadsOf(parsed)[0];
  if (!due) return null;
  return (
    <span className="truncate text-s text-ink-3 max-[1679px]:hidden">
      {formatCount(Math.round(due))} due a week
      {tightest && `, ${tightest.station.name} can make ${formatCount(Math.round(tightest.capacity))}`}
    </span>
  );
}
