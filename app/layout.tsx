import type { Metadata, Viewport } from "next";
import { cookies } from "next/headers";
import type { ReactNode } from "react";
import { preload } from "react-dom";
import { Providers } from "@/components/providers";
import { parseTheme, themeCookie } from "@/components/shell/theme";
import "./globals.css";

export const metadata: Metadata = {
  title: { default: "Agraffe", template: "%s · Agraffe" },
  description: "The service book of a piano-tuning business.",
  robots: { index: false, follow: false },
};

export const viewport: Viewport = {
  width: "device-width",
  initialScale: 1,
  viewportFit: "cover",
  themeColor: [
    { media: "(prefers-color-scheme: light)", color: "#f3ede1" },
    { media: "(prefers-color-scheme: dark)", color: "#110f0c" },
  ],
};

const firstFaces = [
  "/fonts/public-sans-latin-wght-normal.woff2",
  "/fonts/newsreader-latin-opsz-normal.woff2",
];

export default async function RootLayout({ children }: { children: ReactNode }) {
  const theme = parseTheme((await cookies()).get(themeCookie)?.value);
  for (const face of firstFaces) {
    preload(face, { as: "font", type: "font/woff2", crossOrigin: "anonymous" });
  }
  return (
    <html lang="en" data-theme={theme === "system" ? undefined : theme}>
      <body>
        <Providers>{children}</Providers>
      </body>
    </html>
  );
}
