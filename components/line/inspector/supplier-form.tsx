import { DistributionFields } from "@/components/forms/distribution-fields";
import {
  BoundCheckbox,
  BoundNumber,
  BoundShare,
  BoundText,
  FieldPair,
  OptionalBlock,
} from "@/components/forms/field-scope";

export function SupplierForm() {
  return (
    <>
      <BoundText path="name" label="Name" />
      <FieldPair>
        <BoundNumber path="leadTimeDays" label="Lead time, quoted" unit="days" step={1} />
        <BoundShare path="onTimeShare" label="On time" />
      </FieldPair>
      <OptionalBlock
        path="lateness"
        label="Late deliveries"
        hint="Working days added to the lead time when a delivery is not on time; negative is early."
        fresh={{ type: "gamma", mean: 2, sd: 1.5 }}
      >
        <DistributionFields path="lateness" label="Lateness" unit="days" />
      </OptionalBlock>
      <BoundNumber
        path="correlation"
        label="Late follows late"
        hint="Correlation of one order with the next: 0 to less than 1."
        step={0.05}
      />
      <BoundCheckbox
        path="keepsSequence"
        label="Keeps sequence"
        hint="A later order never arrives before an earlier one."
      />
      <OptionalBlock
        path="disruption"
        label="Disruptions"
        hint="Times in which nothing arrives."
        fresh={{ meanDaysBetween: 240, meanDaysLasting: 5 }}
      >
        <FieldPair>
          <BoundNumber path="disruption.meanDaysBetween" label="Between, mean" unit="days" />
          <BoundNumber path="disruption.meanDaysLasting" label="Lasting, mean" unit="days" />
        </FieldPair>
      </OptionalBlock>
      <FieldPair>
        <BoundShare path="rejectRate" label="Rejected units" />
        <BoundShare path="lotRejectRate" label="Refused deliveries" />
      </FieldPair>
      <BoundShare
        path="share"
        label="Share of each order"
        hint="The shares of all suppliers of one buffer make 100 %."
      />
    </>
  );
}
