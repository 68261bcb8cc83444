import { BoundNumber, BoundShare, BoundText, FieldPair, OptionalBlock } from "@/components/forms/field-scope";
import { useLine } from "@/lib/client/line-state";

export function LineForm() {
  const { document } = useLine();
  return (
    <>
      <BoundText path="name" label="Name of the line" />
      <h3 className="figure-title pt-1">Calendar</h3>
      <FieldPair>
        <BoundNumber path="calendar.tickMinutes" label="Tick" unit="min" />
        <BoundNumber path="calendar.hoursPerDay" label="Hours a day" unit="h" />
        <BoundNumber path="calendar.daysPerWeek" label="Days a week" unit="days" isWhole step={1} />
        <BoundNumber path="calendar.weeksPerYear" label="Weeks a year" unit="weeks" step={1} />
      </FieldPair>
      <h3 className="figure-title pt-1">Money</h3>
      <FieldPair>
        <BoundText path="money.currency" label="Currency" />
        <BoundShare path="money.carryingRate" label="Carrying cost a year" />
      </FieldPair>
      <OptionalBlock
        path="overtime"
        label="Overtime"
        hint="In the week after a backlog. Hours, rest and breaks follow local working-time rules."
        fresh={{ backlogTrigger: 20, hoursPerWeek: 8, costPerHour: 500 }}
      >
        <BoundNumber path="overtime.backlogTrigger" label="When more is owed than" unit="units" step={5} />
        <FieldPair>
          <BoundNumber path="overtime.hoursPerWeek" label="Hours a week" unit="h" />
          <BoundNumber path="overtime.costPerHour" label="Cost" unit={`${document.money.currency} an hour`} />
        </FieldPair>
      </OptionalBlock>
    </>
  );
}
