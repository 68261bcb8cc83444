import { act, fireEvent, screen, waitFor, within } from "@testing-library/react";
import userEvent from "@testing-library/user-event";
import { expect, it } from "vitest";
import { LineTable } from "@/components/line/table/line-table";
import type { DraftLine, Line } from "@/lib/line/types";
import type { Role } from "@/lib/schema/roles";
import { percentile } from "@/lib/simulation";
import { withSizes } from "@/lib/sizing/problem";
import { createDraft, createRoutes, createScenario, exampleDocument, renderLine, serve } from "./line-harness";
import { createProbe } from "./line-probe";

const { probe, Probe } = createProbe();

function open(role: Role = "engineer", scenario = createScenario()) {
  serve(createRoutes(role, [scenario]));
  renderLine({
    role,
    scenarios: [scenario],
    children: (
      <>
        <Probe />
        <LineTable />
      </>
    ),
  });
}
const cell = (name: string) => screen.getByLabelText<HTMLInputElement>(name);
const nodeOf = (id: string) => probe.line.document.nodes.find((node) => node.id === id);
const nameOf = (id: string) => exampleDocument.nodes.find((node) => node.id === id)?.name;
const paste = (target: HTMLElement, text: string) =>
  fireEvent.paste(target, { clipboardData: { getData: () => text } });

it("lists every node of the line in the table of its kind", () => {
  open();
  for (const caption of ["Purchased stock", "Between stations", "Finished goods", "Stations", "Suppliers", "Customers"])
    expect(screen.getByText(caption)).toBeTruthy();
  const nNames = document.querySelectorAll('[data-cell$=":0"]').length;
  expect(nNames).toBe(exampleDocument.nodes.length);
});

it("writes each sound stroke and keeps what cannot be read in the cell", () => {
  open();
  const size = cell(`${nameOf("stator")}: Size, units`);
  fireEvent.change(size, { target: { value: "60" } });
  expect(nodeOf("stator")).toMatchObject({ size: 60 });
  fireEvent.change(size, { target: { value: "6o" } });
  expect(size.value).toBe("6o");
  expect(size.getAttribute("aria-invalid")).toBe("true");
  expect(nodeOf("stator")).toMatchObject({ size: 60 });
  fireEvent.blur(size);
  expect(size.value).toBe("60");
  expect(size.title).toBe("was 48");
});

it("takes a block of cells as one step of undo and lists what it could not use", () => {
  open();
  const before = probe.line.document;
  const first = cell(`${nameOf("wind")}: Cycle, min`);
  paste(first, "6.5\t0.3\t2\n7,25\tfast\t1");
  const stations = probe.line.document.nodes.filter(({ kind }) => kind === "station");
  expect(stations[0]).toMatchObject({ cycleMinutes: 6.5, cycleCv: 0.3, parallel: 2 });
  expect(stations[1]).toMatchObject({ cycleMinutes: 7.25, parallel: 1 });
  expect(screen.getByText("1 pasted cell was not used")).toBeTruthy();
  expect(screen.getByText(/^Row 2, column 2: “fast” is not a number/)).toBeTruthy();
  act(() => probe.line.undo());
  expect(probe.line.document).toEqual(before);
});

it("moves from cell to cell by arrow keys and Enter", async () => {
  open();
  const user = userEvent.setup();
  const cycles = [...document.querySelectorAll<HTMLInputElement>('input[aria-label$=": Cycle, min"]')];
  await user.click(cycles[0]);
  await user.keyboard("{ArrowDown}");
  expect(document.activeElement).toBe(cycles[1]);
  await user.keyboard("{Enter}");
  expect(document.activeElement).toBe(cycles[2]);
  await user.keyboard("{Shift>}{Enter}{/Shift}");
  expect(document.activeElement).toBe(cycles[1]);
  await user.keyboard("{ArrowRight}");
  expect(document.activeElement?.getAttribute("aria-label")).toMatch(/: Variation$/);
});

it("marks a faulty cell with the sentence of the fault", () => {
  open();
  const scrap = cell(`${nameOf("wind")}: Scrap, %`);
  fireEvent.change(scrap, { target: { value: "100" } });
  expect(probe.line.faults).toMatchObject([{ node: "wind", path: "scrapRate" }]);
  expect(scrap.title).toBe(probe.line.faults[0].message);
});

it("shows readings beside the fields after a run, customers at the accepted risk", async () => {
  // Short of boards, so that the worst quarter of weeks is not as bad as the worst tenth.
  const document = withSizes(exampleDocument as unknown as Line, { pcb: 3600, fg: 30 }) as unknown as DraftLine;
  const draft = createDraft({ document });
  const options = { ...draft.options, replications: 6, weeks: 8, acceptedRisk: 0.25 };
  open("engineer", createScenario({ draft: { ...draft, options } }));
  act(() => probe.line.runFull());
  await waitFor(() => expect(probe.line.full).not.toBeNull());
  const table = screen.getByText("Customers").closest("table")!;
  expect(within(table).getByRole("columnheader", { name: "P25" })).toBeTruthy();
  const { result } = probe.line.full!;
  const row = within(table).getByDisplayValue(nameOf("cus-a")!).closest("tr")!;
  const [p25, p10] = [0.25, 0.1].map((p) => (percentile(result, p, "cus-a").value * 100).toFixed(1));
  expect(p25).not.toBe(p10);
  expect(row.textContent).toContain(p25);
  expect(screen.getByText("Tied up in all buffers")).toBeTruthy();
});

it("lets a viewer read and type nothing", () => {
  open("viewer");
  expect([...document.querySelectorAll<HTMLInputElement>("[data-cell]")].every(({ readOnly }) => readOnly)).toBe(true);
  const before = probe.line.document;
  paste(cell(`${nameOf("wind")}: Cycle, min`), "1\t2");
  expect(probe.line.document).toBe(before);
});

it("says how to begin where nothing is drawn", () => {
  const draft = createDraft({ document: { ...exampleDocument, nodes: [], links: [] } });
  open("engineer", createScenario({ draft }));
  expect(screen.getByText("Nothing is drawn yet")).toBeTruthy();
});
