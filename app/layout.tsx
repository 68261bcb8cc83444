import type { Metadata, Viewport } from "next";
import { cookies } from "next/headers";
import { HatchDefs } from "@/components/charts/hatch-defs";
import { Toaster } from "@/components/ui/toast";
import { readTheme } from "@/components/layout/theme";
import "./globals.css";

export const metadata: Metadata = {
  title: { default: "Forebay", template: "%s · Forebay" },
  description: "How much stock stands where, read at the risk you accept.",
};

export const viewport: Viewport = { width: "device-width", initialScale: 1 };

export default async function RootLayout({ children }: LayoutProps<"/">) {
  const theme = readTheme((await cookies()).get("theme")?.value);
  return (
    <html lang="en" data-theme={theme === "system" ? undefined : theme}>
      <body>
        <HatchDefs />
        {children}
        <Toaster />
      </body>
    </html>
  );
}
