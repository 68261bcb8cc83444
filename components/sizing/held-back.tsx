import { causeLabel } from "@/components/readings/cause-words";
import { formatChosenPercent, formatNumber, formatShare, spreadText } from "@/lib/format";
import type { Line } from "@/lib/line/types";
import type { FrontierPoint } from "@/lib/sizing";

/** Where stock cannot reach a risk: what holds the line back then, which is no buffer's size. */
export function HeldBack({ point, line }: { point: FrontierPoint; line: Line }) {
  const { acceptedRisk, confirmed } = point;
  const causes = confirmed.causes.filter(({ reason }) => reason !== "size").slice(0, 3);
  const risk = formatShare(confirmed.summary.risk);
  return (
    <div className="caution mt-3">
      <p>
        Stock alone does not bring this line to {formatChosenPercent(acceptedRisk)}: with the set found, which does
        about as well as the largest sizes in range, the risk is <b className="font-[640]">{risk.value}</b>{" "}
        {risk.spread}.
      </p>
      {causes.length > 0 && (
        <>
          <p className="mt-1">What holds it back is no buffer’s size:</p>
          <ul className="mt-0.5 list-disc pl-5">
            {causes.map(({ node, reason, hoursPerWeek }) => (
              <li key={`${node} ${reason}`}>
                {causeLabel(line, node, reason)}, {formatNumber(hoursPerWeek.value, 2)} h a week{" "}
                <span className="text-s text-ink-3">
                  {hoursPerWeek.halfWidth !== null && spreadText(formatNumber(hoursPerWeek.halfWidth, 2))}
                </span>
              </li>
            ))}
          </ul>
        </>
      )}
      <p className="mt-1 text-s text-ink-3">
        A larger range, a faster or steadier station, or a better supplier can; try them as scenarios.
      </p>
    </div>
  );
}
