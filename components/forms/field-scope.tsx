"use client";

import { createContext, type ReactNode, use } from "react";
import { Checkbox } from "@/components/ui/checkbox";
import { NumberField } from "@/components/ui/number-field";
import { Pick } from "@/components/ui/pick";
import { TextField } from "@/components/ui/text-field";
import type { Fault } from "@/lib/line/types";
import { faultOf } from "./fault-lookup";

type Scope = {
  /** What the fields are of: a node or the line itself. */
  value: object;
  faults: readonly Fault[];
  nodeId?: string;
  readOnly: boolean;
  set(path: string, value: unknown): void;
};

const ScopeContext = createContext<Scope | null>(null);

/** Binds the fields inside to one node or to the line: they read by path, and write one edit for each sound stroke. */
export function FieldScope({ scope, children }: { scope: Scope; children: ReactNode }) {
  return <ScopeContext value={scope}>{children}</ScopeContext>;
}

export function useFieldScope(): Scope {
  const scope = use(ScopeContext);
  if (!scope) throw new Error("a bound field outside FieldScope");
  return scope;
}

export function readPath(value: unknown, path: string): unknown {
  return path
    .split(".")
    .reduce<unknown>((part, key) => (part as Record<string, unknown> | null | undefined)?.[key], value);
}

type NumberProps = {
  path: string;
  label: string;
  unit?: string;
  hint?: ReactNode;
  factor?: number;
  isWhole?: boolean;
  step?: number;
  placeholder?: string;
  className?: string;
};

export function BoundNumber({ path, ...rest }: NumberProps) {
  const { value, faults, nodeId, readOnly, set } = useFieldScope();
  const current = readPath(value, path);
  return (
    <NumberField
      {...rest}
      value={typeof current === "number" ? current : null}
      error={faultOf(faults, nodeId, path)}
      readOnly={readOnly}
      onChange={(next) => set(path, next)}
    />
  );
}

/** A share, typed and shown in percent. */
export function BoundShare(props: Omit<NumberProps, "unit" | "factor">) {
  return <BoundNumber {...props} unit="%" factor={100} />;
}

export function BoundText({ path, label, hint }: { path: string; label: string; hint?: string }) {
  const { value, faults, nodeId, readOnly, set } = useFieldScope();
  return (
    <TextField
      label={label}
      hint={hint}
      value={String(readPath(value, path) ?? "")}
      error={faultOf(faults, nodeId, path)}
      readOnly={readOnly}
      maxLength={120}
      onChange={(next) => set(path, next)}
    />
  );
}

type PickProps = { path: string; label: string; options: readonly { value: string; label: string }[] };

export function BoundPick({ path, label, options }: PickProps) {
  const { value, faults, nodeId, readOnly, set } = useFieldScope();
  return (
    <Pick
      isField
      label={label}
      value={String(readPath(value, path) ?? "")}
      options={options}
      disabled={readOnly}
      error={faultOf(faults, nodeId, path)}
      onChange={(next) => set(path, next)}
    />
  );
}

export function BoundCheckbox({ path, label, hint }: { path: string; label: string; hint?: string }) {
  const { value, readOnly, set } = useFieldScope();
  return (
    <Checkbox
      label={label}
      hint={hint}
      checked={readPath(value, path) === true}
      disabled={readOnly}
      onChange={(next) => set(path, next)}
    />
  );
}

type BlockProps = { path: string; label: string; hint?: string; fresh: unknown; children: ReactNode };

/** A part of a node that may be absent: the box switches it on with its usual numbers, or takes it out. */
export function OptionalBlock({ path, label, hint, fresh, children }: BlockProps) {
  const { value, readOnly, set } = useFieldScope();
  const isOn = readPath(value, path) !== null;
  return (
    <section>
      <Checkbox
        label={label}
        hint={hint}
        checked={isOn}
        disabled={readOnly}
        onChange={(next) => set(path, next ? fresh : null)}
      />
      {isOn && <div className="ml-[7px] space-y-3 border-l border-rule pt-1 pb-1 pl-3">{children}</div>}
    </section>
  );
}

/** Two fields side by side. */
export function FieldPair({ children }: { children: ReactNode }) {
  return <div className="grid grid-cols-2 items-start gap-x-3 gap-y-3">{children}</div>;
}
