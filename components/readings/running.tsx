import { Button } from "@/components/ui/button";
import { formatCount } from "@/lib/format";

type Props = { share: number; replications: number; onCancel(): void; className?: string };

/** How far a run is that was asked for on the page, and the way to end it. */
export function Running({ share, replications, onCancel, className }: Props) {
  return (
    <p role="status" className={`text-ink-2 ${className ?? ""}`}>
      Running {formatCount(Math.round(share * replications))} of {formatCount(replications)} replications{" "}
      <Button size="small" kind="stop" onClick={onCancel}>
        Cancel
      </Button>
    </p>
  );
}
