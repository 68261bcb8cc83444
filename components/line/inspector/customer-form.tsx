import { DistributionFields } from "@/components/forms/distribution-fields";
import { BoundNumber, BoundPick, BoundText, FieldPair } from "@/components/forms/field-scope";
import { useLine } from "@/lib/client/line-state";

export function CustomerForm() {
  const { document } = useLine();
  return (
    <>
      <BoundText path="name" label="Name" />
      <DistributionFields path="weeklyDemand" label="Weekly demand" unit="units" />
      <BoundNumber
        path="correlation"
        label="Week follows week"
        hint="Correlation of one week's demand with the next."
        step={0.05}
      />
      <FieldPair>
        <BoundPick
          path="callOff"
          label="Call-off"
          options={[
            { value: "daily", label: "daily parts" },
            { value: "weekly", label: "all on day one" },
          ]}
        />
        <BoundPick
          path="unmet"
          label="Unmet demand"
          options={[
            { value: "backorder", label: "is owed" },
            { value: "lost", label: "is lost" },
          ]}
        />
      </FieldPair>
      <BoundNumber path="lateFine" label="Late fine" unit={`${document.money.currency} a unit and week`} />
    </>
  );
}
