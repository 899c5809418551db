import "server-only";
import sharp from "sharp";
import type { Ctx } from "@/lib/auth/context";
import { registerFile } from "@/lib/services/files/files";
import { perform } from "@/lib/services/verb";
import { storage } from "@/lib/storage/storage";

/** A drawn stand-in for a workshop photo: four runners under a lamp, and at one of them smoke. */
function drawing(random: () => number, withSmoke: boolean): string {
  const runner = (x: number, lean: number) =>
    `<g transform="translate(${x} 0) skewX(${lean})"><rect x="0" y="-40" width="150" height="760" fill="url(#steel)"/><path d="M0 ${420 + random() * 40} q75 26 150 0" fill="none" stroke="#15191b" stroke-width="7" opacity=".8"/></g>`;
  const smoke = withSmoke
    ? Array.from(
        { length: 26 },
        () =>
          `<circle cx="${690 + (random() - 0.5) * 240}" cy="${330 - random() * 280}" r="${20 + random() * 70}" fill="#dfe5e8" opacity="${0.05 + random() * 0.12}"/>`,
      ).join("")
    : "";
  return `<svg xmlns="http://www.w3.org/2000/svg" width="1200" height="675" viewBox="0 0 1200 675">
    <defs><linearGradient id="steel" x1="0" x2="1"><stop offset="0" stop-color="#23292c"/><stop offset=".38" stop-color="#9aa7ad"/><stop offset=".55" stop-color="#c9d2d6"/><stop offset="1" stop-color="#1c2124"/></linearGradient>
    <radialGradient id="lamp" cx=".62" cy=".3" r=".8"><stop offset="0" stop-color="#fff" stop-opacity=".22"/><stop offset="1" stop-color="#000" stop-opacity=".55"/></radialGradient>
    <filter id="soft"><feGaussianBlur stdDeviation="14"/></filter></defs>
    <rect width="1200" height="675" fill="#111618"/>${[90, 350, 610, 870].map((x, index) => runner(x, -4 + index * 1.5)).join("")}
    <g filter="url(#soft)">${smoke}</g><rect width="1200" height="675" fill="url(#lamp)"/></svg>`;
}

const SMOKY = new Set([
  "intake-air-leak",
  "air-duct-leak",
  "crankcase-vent-fault",
  "exhaust-leak-upstream",
  "charge-air-leak",
]);

/** Gives some cases a photo. Without a file store there are none, and the rest of the demo stands. */
export function photosFor(random: () => number) {
  let isReachable = true;
  return async (ctx: Ctx, caseId: string, cause: string | undefined): Promise<void> => {
    const wanted = SMOKY.has(cause ?? "") || random() < 0.3;
    if (!isReachable || !wanted || !process.env.UPLOADTHING_TOKEN) return;
    try {
      const jpeg = await sharp(Buffer.from(drawing(random, SMOKY.has(cause ?? ""))))
        .jpeg({ quality: 84 })
        .toBuffer();
      const storageKey = await storage().put(new Uint8Array(jpeg), { name: "bay.jpg", contentType: "image/jpeg" });
      await perform(registerFile, ctx, {
        caseId,
        kind: "photo",
        name: "bay.jpg",
        bytes: jpeg.byteLength,
        contentType: "image/jpeg",
        storageKey,
      });
    } catch {
      isReachable = false;
    }
  };
}
