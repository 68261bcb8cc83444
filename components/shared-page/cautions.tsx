import { parseLine } from "@/lib/line";
import { cautionsOf, generalCautions } from "@/lib/line/cautions";
import { describeAbout } from "@/lib/line/describe-fault";
import type { DraftLine } from "@/lib/line/types";

/** What to bear in mind before acting on the figures. */
export function Cautions({ document }: { document: DraftLine }) {
  const parsed = parseLine(document);
  const own = "line" in parsed ? cautionsOf(parsed.line).map((caution) => describeAbout(caution, document)) : [];
  return (
    <section className="caution">
      <h2 className="font-[620]">Cautions</h2>
      <ul className="mt-1 list-disc space-y-1 pl-5">
        {[...own, ...generalCautions].map((text) => (
          <li key={text}>{text}</li>
        ))}
      </ul>
    </section>
  );
}
