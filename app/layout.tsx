import type { Metadata, Viewport } from "next";
import { cookies, headers } from "next/headers";
import type { ReactNode } from "react";
import { fontPreloads } from "./fonts";
import "./globals.css";

export const metadata: Metadata = {
  title: { default: "Firedeck", template: "%s · Firedeck" },
  icons: { icon: "/favicon.svg" },
};

export const viewport: Viewport = { width: "device-width", initialScale: 1, themeColor: "#f4f7f8" };

export default async function RootLayout({ children }: { children: ReactNode }) {
  const density = (await cookies()).get("fd-density")?.value === "bay" ? "bay" : "counter";
  const nonce = (await headers()).get("x-nonce") ?? undefined;
  return (
    // the script below sets theme and density before the first paint, so they may differ from the server's
    <html lang="en" data-density={density} suppressHydrationWarning>
      <head>
        {fontPreloads.map((href) => (
          <link key={href} rel="preload" href={href} as="font" type="font/woff2" crossOrigin="anonymous" />
        ))}
        <script src="/theme.js" nonce={nonce} suppressHydrationWarning />
      </head>
      <body>{children}</body>
    </html>
  );
}
