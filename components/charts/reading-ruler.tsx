import type { ReadingSummary } from "@/lib/schema/lines";
import { FillRateRuler, rulerStart } from "./fill-rate-ruler";

type Props = { reading: ReadingSummary; from?: number; hasWhisker?: boolean };

/** The fill rates of a stored reading on the ruler. */
export function ReadingRuler({ reading: { p05, atRisk, p50, acceptedRisk }, from, hasWhisker }: Props) {
  return (
    <FillRateRuler
      p05={p05.value}
      atRisk={atRisk}
      p50={p50.value}
      acceptedRisk={acceptedRisk}
      from={from}
      hasWhisker={hasWhisker}
    />
  );
}

/** Left end of one scale for several readings. */
export function rulerStartOf(readings: readonly (ReadingSummary | null)[]): number {
  return rulerStart(...readings.flatMap((reading) => (reading ? [reading.p05.value, reading.atRisk.value] : [])));
}
