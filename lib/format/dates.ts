const months = ["Jan", "Feb", "Mar", "Apr", "May", "Jun", "Jul", "Aug", "Sep", "Oct", "Nov", "Dec"];

const two = (n: number) => String(n).padStart(2, "0");

/** "24 Nov 2026", in the reader's time zone. */
export function formatDate(instant: string | Date): string {
  const date = new Date(instant);
  if (Number.isNaN(date.getTime())) return "–";
  return `${date.getDate()} ${months[date.getMonth()]} ${date.getFullYear()}`;
}

/** "14:02", in the reader's time zone. */
export function formatTime(instant: string | Date): string {
  const date = new Date(instant);
  return Number.isNaN(date.getTime()) ? "–" : `${two(date.getHours())}:${two(date.getMinutes())}`;
}

/** "24 Nov 2026, 14:02". */
export function formatDateTime(instant: string | Date): string {
  return `${formatDate(instant)}, ${formatTime(instant)}`;
}
