"use client";

import { BoundNumber, BoundText, FieldPair, readPath, useFieldScope } from "@/components/forms/field-scope";
import { Pick } from "@/components/ui/pick";
import { useLine } from "@/lib/client/line-state";
import type { DraftOf } from "@/lib/line/types";
import { BufferReading } from "./buffer-reading";
import { SizeCurve } from "./size-curve";

export function BufferForm({ node }: { node: DraftOf<"buffer"> }) {
  const { document } = useLine();
  const rule = node.replenishment?.rule;
  return (
    <>
      <BufferReading node={node} />
      <BoundText path="name" label="Name" />
      {rule && <RulePick />}
      <BoundNumber
        path="size"
        label={sizeName(node)}
        unit="units"
        isWhole
        step={stepFor(node.size)}
        hint={rule ? "On hand plus on order." : "Level plus reserved places never exceed it."}
      />
      {rule && <ReplenishmentFields rule={rule} />}
      <FieldPair>
        <BoundNumber path="unitValue" label="Value" unit={`${document.money.currency} a unit`} />
        <BoundNumber path="startLevel" label="Start level" unit="units" isWhole placeholder="full" />
      </FieldPair>
      <SizeCurve key={node.id} node={node} />
    </>
  );
}

export function sizeName({ replenishment }: DraftOf<"buffer">): string {
  if (!replenishment) return "Places";
  return replenishment.rule === "orderUpTo" ? "Order-up-to level" : "Reorder point";
}

/** Steps of a fitting size: a tenth of its power of ten, at least one unit. */
export function stepFor(size: number | null): number {
  return size === null || size < 100 ? 1 : 10 ** (String(Math.floor(size)).length - 2);
}

function RulePick() {
  const { value, readOnly, set } = useFieldScope();
  const old = readPath(value, "replenishment") as NonNullable<DraftOf<"buffer">["replenishment"]>;
  return (
    <Pick
      isField
      label="Replenishment"
      value={old.rule}
      disabled={readOnly}
      options={[
        { value: "orderUpTo", label: "Order up to a level, at each review" },
        { value: "reorderPoint", label: "Order lots at a reorder point" },
      ]}
      onChange={(rule) =>
        set("replenishment", { ...old, rule, lot: rule === "orderUpTo" ? null : (old.lot ?? old.orderMultiple) })
      }
    />
  );
}

function ReplenishmentFields({ rule }: { rule: "orderUpTo" | "reorderPoint" }) {
  return (
    <FieldPair>
      <BoundNumber path="replenishment.reviewDays" label="Review every" unit="days" isWhole step={1} />
      {rule === "reorderPoint" && <BoundNumber path="replenishment.lot" label="Lot" unit="units" isWhole />}
      <BoundNumber path="replenishment.orderMultiple" label="Order multiple" unit="units" isWhole />
      <BoundNumber path="replenishment.minimumOrder" label="Minimum order" unit="units" isWhole />
    </FieldPair>
  );
}
