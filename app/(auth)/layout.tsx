import { WaterMark } from "@/components/layout/water-mark";
import { ForebaySection } from "./_components/forebay-section";

export default function AuthLayout({ children }: LayoutProps<"/">) {
  return (
    <div className="min-h-dvh lg:grid lg:grid-cols-[minmax(420px,36%)_1fr]">
      <main className="flex min-h-dvh flex-col bg-sheet px-5 py-8 sm:px-16 sm:py-10 lg:border-r lg:border-ink">
        <p className="flex items-center gap-2.5 text-xl font-[680] tracking-[-.01em]">
          <WaterMark size={26} />
          Forebay
        </p>
        <div className="mx-auto my-auto w-full max-w-[400px] py-8 lg:mx-0">{children}</div>
        <p className="text-s text-ink-3">
          Simulations run in your browser. Figures are estimates from the inputs you give.
        </p>
      </main>
      <div className="hidden place-items-center px-12 lg:grid">
        <ForebaySection />
      </div>
    </div>
  );
}
