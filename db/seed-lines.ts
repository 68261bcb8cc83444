import exampleLine from "@/lib/line/example.json";
import { autoLayout } from "@/lib/line/auto-layout";
import type { DraftLine, DraftOf } from "@/lib/line/types";
import { DraftLineInput } from "@/lib/line/draft-schema";
import type { Content } from "./queries/content";

type Sheet = Omit<Content, "options">;

/** The drive unit line of Larkfield Drives with a remark on the controller boards. */
export function driveUnitSheet(author: string, at: string): Sheet {
  const document: DraftLine = DraftLineInput.parse(exampleLine);
  const layout = autoLayout(document);
  // Below the end-of-line test the sheet is free.
  const { x } = layout.positions.eol;
  const y = layout.positions.stator.y;
  const text = "Boards are the longest wait after magnets. Purchasing expects the quoted 25 days to hold until spring.";
  return { document, layout, notes: [{ id: "note-boards", x, y, text, author, at }] };
}

const larger: Record<string, number> = { pcb: 6_000, gear: 4_500 };

/** The same line with more controller boards and gear sets. */
export function largerStocks(sheet: Sheet): Sheet {
  const nodes = sheet.document.nodes.map((node) =>
    node.kind === "buffer" && node.id in larger ? { ...node, size: larger[node.id] } : node,
  );
  return { ...sheet, document: { ...sheet.document, nodes } };
}

const station = (id: string, name: string, cycleMinutes: number | null): DraftOf<"station"> => ({
  kind: "station",
  id,
  name,
  cycleMinutes,
  cycleCv: 0.15,
  parallel: 1,
  scrapRate: 0.005,
  stoppages: null,
});

const buffer = (id: string, name: string, size: number | null, unitValue: number): DraftOf<"buffer"> => ({
  kind: "buffer",
  id,
  name,
  size,
  startLevel: null,
  unitValue,
  replenishment: null,
});

/** A line somebody has only begun to draw: two stations without a cycle time, one buffer without a size. */
export function batteryPackSheet(): Sheet {
  const cells: DraftOf<"supplier"> = {
    kind: "supplier",
    id: "sup-cells",
    name: "Battery cells",
    leadTimeDays: 35,
    lateness: { type: "lognormal", mean: 3, sd: 2.5 },
    onTimeShare: 0.6,
    correlation: 0,
    keepsSequence: true,
    disruption: null,
    rejectRate: 0.002,
    lotRejectRate: 0,
    share: 1,
  };
  const stock: DraftOf<"buffer"> = {
    ...buffer("cells", "Cell modules", null, 88),
    replenishment: { rule: "orderUpTo", reviewDays: 5, lot: null, minimumOrder: 0, orderMultiple: 20 },
  };
  const customer: DraftOf<"customer"> = {
    kind: "customer",
    id: "cus-c",
    name: "Scooter maker East",
    weeklyDemand: { type: "gamma", mean: 240, sd: 40 },
    correlation: 0.2,
    callOff: "daily",
    unmet: "backorder",
    lateFine: 6,
  };
  const document: DraftLine = {
    format: "forebay.line/1",
    name: "Battery pack line",
    calendar: { tickMinutes: 6, hoursPerDay: 16, daysPerWeek: 5, weeksPerYear: 48 },
    money: { currency: "EUR", carryingRate: 0.2 },
    overtime: null,
    nodes: [
      cells,
      stock,
      station("weld", "Module welding", null),
      buffer("welded", "Welded modules", 30, 96),
      station("pack", "Pack assembly", 14),
      buffer("packs", "Assembled packs", 20, 240),
      station("cycle", "Charge and discharge test", null),
      buffer("ready", "Packs ready to ship", 80, 265),
      customer,
    ],
    links: [
      { from: "sup-cells", to: "cells" },
      { from: "cells", to: "weld", quantity: 4 },
      { from: "weld", to: "welded" },
      { from: "welded", to: "pack" },
      { from: "pack", to: "packs" },
      { from: "packs", to: "cycle" },
      { from: "cycle", to: "ready" },
      { from: "ready", to: "cus-c" },
    ],
  };
  return { document, layout: autoLayout(document), notes: [] };
}
