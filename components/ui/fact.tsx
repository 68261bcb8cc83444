/** A figure under its name, with its half-width. */
export function Fact({ name, text }: { name: string; text: { value: string; spread: string | null } }) {
  return (
    <p className="whitespace-nowrap">
      <span className="block text-s text-ink-3">{name}</span>
      <b className="font-[620]">{text.value}</b> <span className="text-s text-ink-3">{text.spread}</span>
    </p>
  );
}
