"use client";

import { useState } from "react";
import { ErrorLine } from "@/components/ui/error-line";
import { Pick } from "@/components/ui/pick";
import { formatCount, formatNumber } from "@/lib/format";
import { explainNumber, readNumber } from "@/lib/line/clipboard";
import { meanOf, sdOf } from "@/lib/line/distribution-mean";
import type { DraftDistribution } from "@/lib/line/types";
import { faultOf } from "./fault-lookup";
import { BoundNumber, FieldPair, readPath, useFieldScope } from "./field-scope";

type Type = DraftDistribution["type"];

const types: readonly { value: Type; label: string }[] = [
  { value: "fixed", label: "fixed" },
  { value: "normal", label: "normal" },
  { value: "lognormal", label: "lognormal" },
  { value: "gamma", label: "gamma" },
  { value: "weibull", label: "Weibull" },
  { value: "exponential", label: "exponential" },
  { value: "uniform", label: "uniform" },
  { value: "triangular", label: "triangular" },
  { value: "poisson", label: "Poisson" },
  { value: "negativeBinomial", label: "negative binomial" },
  { value: "empirical", label: "observed values" },
];

const parameters: Record<Exclude<Type, "empirical">, readonly { key: string; label: string; hasUnit: boolean }[]> = {
  fixed: [{ key: "value", label: "Value", hasUnit: true }],
  normal: meanAndSd(),
  lognormal: meanAndSd(),
  gamma: meanAndSd(),
  negativeBinomial: meanAndSd(),
  weibull: [
    { key: "shape", label: "Shape", hasUnit: false },
    { key: "scale", label: "Scale", hasUnit: true },
  ],
  exponential: [{ key: "mean", label: "Mean", hasUnit: true }],
  poisson: [{ key: "mean", label: "Mean", hasUnit: true }],
  uniform: [
    { key: "min", label: "Least", hasUnit: true },
    { key: "max", label: "Largest", hasUnit: true },
  ],
  triangular: [
    { key: "min", label: "Least", hasUnit: true },
    { key: "mode", label: "Most likely", hasUnit: true },
    { key: "max", label: "Largest", hasUnit: true },
  ],
};

function meanAndSd() {
  return [
    { key: "mean", label: "Mean", hasUnit: true },
    { key: "sd", label: "Standard deviation", hasUnit: true },
  ];
}

/** The same quantity under another type: mean and spread go over where the new type has them. */
export function changeType(from: DraftDistribution, type: Type): DraftDistribution {
  const mean = meanOf(from);
  const sd = sdOf(from);
  const spread = mean === null || sd === null ? null : sd;
  switch (type) {
    case "fixed":
      return { type, value: mean };
    case "weibull":
      return { type, shape: null, scale: null };
    case "exponential":
    case "poisson":
      return { type, mean };
    case "uniform":
      return { type, min: edge(mean, spread, -Math.sqrt(3)), max: edge(mean, spread, Math.sqrt(3)) };
    case "triangular":
      return { type, min: edge(mean, spread, -Math.sqrt(6)), mode: mean, max: edge(mean, spread, Math.sqrt(6)) };
    case "empirical":
      return { type, values: [] };
    default:
      return { type, mean, sd };
  }
}

const edge = (mean: number | null, sd: number | null, by: number) =>
  mean === null || sd === null ? null : Math.round((mean + by * sd) * 100) / 100;

/** Type and parameters of one distribution at a path of the node. */
export function DistributionFields({ path, label, unit }: { path: string; label: string; unit: string }) {
  const { value, faults, nodeId, readOnly, set } = useFieldScope();
  const distribution = readPath(value, path) as DraftDistribution;
  const mean = meanOf(distribution);
  const sd = sdOf(distribution);
  const own = faultOf(faults, nodeId, path) ?? faultOf(faults, nodeId, `${path}.type`);
  return (
    <div className="space-y-3">
      <Pick
        isField
        label={label}
        value={distribution.type}
        options={types}
        disabled={readOnly}
        error={own}
        onChange={(type) => set(path, changeType(distribution, type))}
      />
      {own && <ErrorLine>{own}</ErrorLine>}
      {distribution.type === "empirical" ? (
        <ObservedValues path={`${path}.values`} unit={unit} />
      ) : (
        <FieldPair>
          {parameters[distribution.type].map(({ key, label: name, hasUnit }) => (
            <BoundNumber
              key={`${distribution.type}.${key}`}
              path={`${path}.${key}`}
              label={name}
              unit={hasUnit ? unit : undefined}
            />
          ))}
        </FieldPair>
      )}
      {mean !== null &&
        sd !== null &&
        !["fixed", "normal", "gamma", "lognormal", "negativeBinomial"].includes(distribution.type) && (
          <p className="text-s text-ink-3">
            Mean {formatNumber(mean, 1)} {unit}, standard deviation {formatNumber(sd, 1)} {unit}
          </p>
        )}
    </div>
  );
}

function ObservedValues({ path, unit }: { path: string; unit: string }) {
  const { value, faults, nodeId, readOnly, set } = useFieldScope();
  const values = (readPath(value, path) ?? []) as (number | null)[];
  const [typed, setTyped] = useState(() => values.join("; "));
  const [problem, setProblem] = useState<string | null>(null);
  const error = problem ?? faultOf(faults, nodeId, path);

  function take(text: string) {
    setTyped(text);
    const cells = text.split(/[;\s]+/).filter(Boolean);
    const numbers = cells.map((cell) => readNumber(cell));
    const bad = numbers.findIndex((number) => number === null || Number.isNaN(number));
    setProblem(bad >= 0 ? `${explainNumber(cells[bad])}.` : null);
    if (bad < 0) set(path, numbers);
  }

  return (
    <label className="block">
      <span className="mb-[3px] block text-s text-ink-2">
        Values, parted by semicolons or line ends ({unit}): {formatCount(values.length)}
      </span>
      <textarea
        className="typed block w-full resize-y rounded-field border border-rule-2 bg-sheet px-2 py-1.5 focus-visible:border-water-600"
        rows={4}
        readOnly={readOnly}
        value={typed}
        aria-invalid={error !== undefined}
        onChange={(event) => take(event.target.value)}
      />
      {error && <ErrorLine className="mt-1">{error}</ErrorLine>}
    </label>
  );
}
