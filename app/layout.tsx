import type { Metadata, Viewport } from "next";
import localFont from "next/font/local";
import { cookies } from "next/headers";
import type { ReactNode } from "react";
import { THEME_COOKIE, themeFrom } from "@/components/shell/theme";
import "./globals.css";

const text = localFont({
  src: "../fonts/atkinson-hyperlegible-next.woff2",
  weight: "200 800",
  variable: "--font-text",
  adjustFontFallback: false,
});
const mono = localFont({
  src: "../fonts/atkinson-hyperlegible-mono.woff2",
  weight: "200 800",
  variable: "--font-mono",
  adjustFontFallback: false,
});
// Atkinson Hyperlegible has no Greek letters: Ω and μ come from these subsets.
const textGreek = localFont({
  src: "../fonts/source-sans-3-greek.woff2",
  weight: "200 900",
  variable: "--font-text-greek",
  adjustFontFallback: false,
  preload: false,
  declarations: [{ prop: "unicode-range", value: "U+0370-03FF" }],
});
const monoGreek = localFont({
  src: "../fonts/source-code-pro-greek.woff2",
  weight: "200 900",
  variable: "--font-mono-greek",
  adjustFontFallback: false,
  preload: false,
  declarations: [{ prop: "unicode-range", value: "U+0370-03FF" }],
});

const fontVariables = [text, mono, textGreek, monoGreek].map((font) => font.variable).join(" ");

export const metadata: Metadata = {
  title: { template: "%s · Stepwell", default: "Stepwell" },
  description: "Runs resistance sweeps by itself, waits until the reading is still, and judges each point.",
};

export const viewport: Viewport = { width: "device-width", initialScale: 1 };

export default async function RootLayout({ children }: { children: ReactNode }) {
  const theme = themeFrom((await cookies()).get(THEME_COOKIE)?.value);
  return (
    <html lang="en" data-theme={theme} className={fontVariables} suppressHydrationWarning>
      <body>{children}</body>
    </html>
  );
}
