import type { ComponentProps } from "react";
import type { ReadingSummary } from "@/lib/schema/lines";
import { FillRateRuler, rulerStart } from "./fill-rate-ruler";

type Ruler = ComponentProps<typeof FillRateRuler>;
type Props = Omit<Ruler, "p05" | "atRisk" | "p50" | "acceptedRisk"> & {
  reading: Pick<ReadingSummary, "p05" | "atRisk" | "p50" | "acceptedRisk">;
};

/** The fill rates of a reading on the ruler. */
export function ReadingRuler({ reading: { p05, atRisk, p50, acceptedRisk }, ...rest }: Props) {
  return <FillRateRuler p05={p05.value} atRisk={atRisk} p50={p50.value} acceptedRisk={acceptedRisk} {...rest} />;
}

/** Left end of one scale for several readings. */
export function rulerStartOf(readings: readonly (ReadingSummary | null)[]): number {
  return rulerStart(...readings.flatMap((reading) => (reading ? [reading.p05.value, reading.atRisk.value] : [])));
}
