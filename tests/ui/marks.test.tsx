import { fireEvent, render, screen } from "@testing-library/react";
import { describe, expect, it, vi } from "vitest";
import { DistributionChart } from "@/components/charts/distribution-chart";
import { FillRateRuler, rulerStart } from "@/components/charts/fill-rate-ruler";
import { StaffGauge, staffTop } from "@/components/charts/staff-gauge";
import { labelled, spread, sweepStart } from "@/components/charts/chart-labels";
import { writeCsv } from "@/components/charts/take-out-figures";

const levels = { p10: 20, p50: 40, p90: 70 };

describe("StaffGauge", () => {
  it("offers its size as a slider to keys and screen readers", () => {
    const onSizeChange = vi.fn();
    render(
      <StaffGauge size={90} levels={levels} isPurchased dry={null} label="Housings" onSizeChange={onSizeChange} />,
    );
    const slider = screen.getByRole("slider", { name: "Size of Housings" });
    expect(slider).toHaveAttribute("aria-valuenow", "90");
    // A parent that is an image would hide it.
    expect(slider.closest("[role=img]")).toBeNull();
    for (const key of ["ArrowUp", "ArrowDown", "PageUp", "PageDown", "a"]) fireEvent.keyDown(slider, { key });
    expect(onSizeChange.mock.calls).toEqual([[91], [89], [100], [80]]);
  });

  it("never goes below one unit", () => {
    const onSizeChange = vi.fn();
    render(<StaffGauge size={1} levels={null} isPurchased={false} dry={null} label="A" onSizeChange={onSizeChange} />);
    fireEvent.keyDown(screen.getByRole("slider"), { key: "PageDown" });
    expect(onSizeChange).toHaveBeenCalledWith(1);
  });

  it("is one image where it only shows", () => {
    render(<StaffGauge size={90} levels={levels} isPurchased dry={0.02} label="Housings" />);
    expect(screen.getByRole("img", { name: "Housings" })).toBeVisible();
    expect(screen.queryByRole("slider")).toBeNull();
  });

  it.each([
    [[0], 2],
    [[95], 100],
    [[96], 200],
    [[120, 380], 400],
    [[5_250], 6_000],
  ])("ends the staff for %j at %d", (values, top) => expect(staffTop(...values)).toBe(top));
});

describe("FillRateRuler", () => {
  const figure = (value: number) => ({ value, halfWidth: 0.01 });

  it.each([
    [[0.9], 0.6],
    [[0.65], 0.6],
    [[0.6], 0.5],
    [[0.004], 0],
    [[NaN], 0.6],
  ])("starts the scale of %j at %d", (shares, from) => expect(rulerStart(...shares)).toBe(from));

  it("draws the accepted risk's bar between P5 and P50, in proportion to the scale", () => {
    const { container } = render(
      <FillRateRuler p05={0.6} atRisk={figure(0.75)} p50={1} acceptedRisk={0.1} from={0.5} />,
    );
    const [silt, water] = [...container.querySelectorAll("rect")].map((rect) => ({
      x: Number(rect.getAttribute("x")),
      width: Number(rect.getAttribute("width")),
    }));
    // 268 px from 50 to 100 %, after a margin of 2.
    expect(silt.x).toBeCloseTo(2 + 268 * 0.2);
    expect(silt.width).toBeCloseTo(268 * 0.3);
    expect(water.x).toBeCloseTo(2 + 268 * 0.5);
    expect(water.width).toBeCloseTo(268 * 0.5);
  });
});

it("draws a bar for each point that has weeks, silt below the mark, and counts the full weeks apart", () => {
  const counts = new Array<number>(100).fill(0);
  [counts[70], counts[80], counts[95]] = [3, 4, 5];
  const histogram = { counts, nFull: 1_234, nWeeks: 1_246, nNoDemand: 0 };
  const { container } = render(
    <DistributionChart histogram={histogram} atRisk={{ value: 0.9, halfWidth: null }} acceptedRisk={0.1} />,
  );
  const fills = [...container.querySelectorAll("rect")].map((rect) => rect.getAttribute("fill"));
  expect(fills).toEqual(["url(#hatch-short)", "url(#hatch-short)", "var(--water-400)"]);
  expect(container.textContent).toContain("1\u202f234");
});

it.each([
  [0.46, "8 weeks below 30", "end"],
  [0.8, "← 8 weeks below 30", "start"],
])("notes the weeks left of the scale clear of a mark at %d", (value, said, anchor) => {
  const counts = new Array<number>(100).fill(10);
  counts.fill(0, 0, 30);
  [counts[20], counts[29]] = [7, 1];
  const histogram = { counts, nFull: 292, nWeeks: 1_000, nNoDemand: 0 };
  const { container } = render(
    <DistributionChart width={400} histogram={histogram} atRisk={{ value, halfWidth: null }} acceptedRisk={0.1} />,
  );
  const note = [...container.querySelectorAll("text")].find((text) => text.textContent?.includes("below"));
  expect(note?.textContent).toBe(said);
  expect(note).toHaveAttribute("text-anchor", anchor);
});

describe("sweep chart", () => {
  it("keeps a scale to read off where every size ships everything", () => {
    expect(sweepStart(1)).toBe(0.95);
    expect(sweepStart(0.87)).toBeCloseTo(0.85);
    expect(sweepStart(-0.02)).toBe(0);
  });

  it("holds labels at the right end apart and on the sheet", () => {
    expect(spread([14, 14, 100], 240)).toEqual([14, 29, 100]);
    expect(spread([244, 244, 244], 240)).toEqual([210, 225, 240]);
  });

  it("names no size where the name before it still stands", () => {
    const at = [0, 5, 10, 40].map((place) => ({ at: place, width: 20 }));
    expect([...labelled(at)]).toEqual([0, 3]);
  });
});

it("takes out figures as text that no spreadsheet runs", () => {
  const rows = [
    ["Name", "P10"],
    ['=HYPERLINK("x")', -0.5],
    ["a, b", null],
    ["@sum", NaN],
  ];
  expect(writeCsv(rows)).toBe(["Name,P10", '"\'=HYPERLINK(""x"")",-0.5', '"a, b",', "'@sum,", ""].join("\r\n"));
});
