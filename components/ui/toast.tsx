"use client";

import { toast as sonner, Toaster as Sonner } from "sonner";
import { TickIcon } from "./icons";

/** Says in one line what was done, for six seconds, with Undo where that is possible. Errors are never said this way. */
export function toast(message: string, options: { action?: { label: string; onClick(): void } } = {}): void {
  sonner.custom((id) => <ToastBar message={message} action={options.action} onDone={() => sonner.dismiss(id)} />, {
    duration: 6_000,
  });
}

function ToastBar({
  message,
  action,
  onDone,
}: {
  message: string;
  action?: { label: string; onClick(): void };
  onDone(): void;
}) {
  return (
    <div
      role="status"
      className="flex min-h-10 w-[min(356px,calc(100vw-32px))] items-center gap-3 bg-ink px-4 py-2 text-on-ink shadow-dialog"
    >
      <TickIcon />
      <span className="min-w-0 flex-1">{message}</span>
      {action && (
        <button
          type="button"
          className="min-h-8 shrink-0 font-[620] underline underline-offset-3"
          onClick={() => {
            action.onClick();
            onDone();
          }}
        >
          {action.label}
        </button>
      )}
    </div>
  );
}

export function Toaster() {
  return <Sonner position="bottom-left" offset={{ bottom: 124, left: 20 }} mobileOffset={16} gap={8} />;
}
