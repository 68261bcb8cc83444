"use client";

import { useState } from "react";
import {
  BoundNumber,
  BoundPick,
  BoundShare,
  BoundText,
  FieldPair,
  OptionalBlock,
  readPath,
  useFieldScope,
} from "@/components/forms/field-scope";
import { faultOf } from "@/components/forms/fault-lookup";
import { NumberField } from "@/components/ui/number-field";
import { Pick } from "@/components/ui/pick";

const upDown = { pattern: "upDown", meanUpHours: 40, meanDownHours: 1, downCv: 1, clock: "running" };
const perTick = { pattern: "perTick", upProbability: 0.95 };

export function StationForm() {
  return (
    <>
      <BoundText path="name" label="Name" />
      <FieldPair>
        <BoundNumber path="cycleMinutes" label="Cycle, mean" unit="min" />
        <BoundNumber path="cycleCv" label="Its variation" hint="sd over mean" step={0.05} />
        <BoundNumber path="parallel" label="Workplaces" isWhole step={1} />
        <BoundShare path="scrapRate" label="Scrap" />
      </FieldPair>
      <OptionalBlock path="stoppages" label="Stoppages" fresh={upDown}>
        <StoppageFields />
      </OptionalBlock>
    </>
  );
}

function StoppageFields() {
  const { value, readOnly, set } = useFieldScope();
  const pattern = String(readPath(value, "stoppages.pattern"));
  const isRandom = readPath(value, "stoppages.downCv") !== null;
  return (
    <>
      <Pick
        isField
        label="Pattern"
        value={pattern}
        disabled={readOnly}
        options={[
          { value: "upDown", label: "up and down times" },
          { value: "perTick", label: "each tick on its own" },
        ]}
        onChange={(next) => set("stoppages", next === "upDown" ? upDown : perTick)}
      />
      {pattern === "perTick" ? (
        <BoundShare path="stoppages.upProbability" label="Ticks up" />
      ) : (
        <>
          <FieldPair>
            <BoundNumber path="stoppages.meanUpHours" label="Between, mean" unit="h" />
            <BoundNumber path="stoppages.meanDownHours" label="Lasting, mean" unit="h" />
          </FieldPair>
          <Pick
            isField
            label="Length of a stoppage"
            value={isRandom ? "lognormal" : "geometric"}
            disabled={readOnly}
            options={[
              { value: "lognormal", label: "lognormal, with a variation" },
              { value: "geometric", label: "geometric: may end any tick" },
            ]}
            onChange={(next) => set("stoppages.downCv", next === "lognormal" ? 1 : null)}
          />
          {isRandom && <LengthVariation />}
          <BoundPick
            path="stoppages.clock"
            label="Time between stoppages runs"
            options={[
              { value: "running", label: "while the station works" },
              { value: "always", label: "whenever it is up" },
            ]}
          />
        </>
      )}
    </>
  );
}

/** Null means geometric in the document, so an emptied field keeps the last number there and says what is missing. */
function LengthVariation() {
  const { value, faults, nodeId, readOnly, set } = useFieldScope();
  const [isEmptied, setEmptied] = useState(false);
  return (
    <NumberField
      label="Variation of its length"
      hint="sd over mean; 0 is always the same"
      step={0.1}
      value={isEmptied ? null : Number(readPath(value, "stoppages.downCv"))}
      error={isEmptied ? "Type a number, or choose geometric above." : faultOf(faults, nodeId, "stoppages.downCv")}
      readOnly={readOnly}
      onChange={(next) => {
        setEmptied(next === null);
        if (next !== null) set("stoppages.downCv", next);
      }}
    />
  );
}
