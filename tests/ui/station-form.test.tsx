import { fireEvent, render, screen } from "@testing-library/react";
import { useState } from "react";
import { expect, it } from "vitest";
import { FieldScope } from "@/components/forms/field-scope";
import { StationForm } from "@/components/line/inspector/station-form";
import { setPath } from "@/lib/line/edits/edit";
import type { Station } from "@/lib/line/types";

const start: Station = {
  kind: "station",
  id: "a",
  name: "Press",
  cycleMinutes: 5,
  cycleCv: 0,
  parallel: 1,
  scrapRate: 0,
  stoppages: { pattern: "upDown", meanUpHours: 40, meanDownHours: 1, downCv: 0.7, clock: "running" },
};

it("keeps the pattern of stoppages while the variation is emptied and typed anew", () => {
  let shown = start;
  function Held() {
    const [node, setNode] = useState(start);
    shown = node;
    const set = (path: string, value: unknown) => setNode((old) => setPath(old, path, value));
    return (
      <FieldScope scope={{ value: node, faults: [], nodeId: "a", readOnly: false, set }}>
        <StationForm />
      </FieldScope>
    );
  }
  render(<Held />);
  const field = screen.getByLabelText<HTMLInputElement>("Variation of its length");
  fireEvent.change(field, { target: { value: "" } });
  expect(field.isConnected).toBe(true);
  expect(field.value).toBe("");
  expect(screen.getByText("Type a number, or choose geometric above.")).toBeTruthy();
  expect(shown.stoppages).toEqual(start.stoppages);
  fireEvent.change(field, { target: { value: "0.4" } });
  expect(shown.stoppages).toEqual({ ...start.stoppages, downCv: 0.4 });
});
