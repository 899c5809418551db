import sharp from "sharp";
import { sniff } from "./sniff";

export interface ProcessedImage {
  /** WebP, upright, at most 1600 px on the long side, without any of the camera's data (place included). */
  display: Uint8Array;
  /** The same at most 320 px. */
  thumbnail: Uint8Array;
  width: number;
  height: number;
}

export type ImageResult = { ok: true; image: ProcessedImage } | { ok: false; reason: string };

const DISPLAY_PX = 1600;
const THUMBNAIL_PX = 320;
/** About a 100-megapixel photo; a small file can claim far more and would take all memory to unpack. */
const MAX_PIXELS = 100_000_000;

const IMAGES = ["image/jpeg", "image/png", "image/webp", "image/avif"];

/**
 * Makes of an uploaded picture what is shown: re-encoded, so that nothing of the original file but its picture is passed
 * on. The reason of a refusal is fit for a user.
 */
export async function processImage(bytes: Uint8Array): Promise<ImageResult> {
  const type = sniff(bytes);
  if (type === "image/heic")
    return {
      ok: false,
      reason:
        "Photos in the HEIC format can't be read here. Set the camera to JPEG (“most compatible”), or send the photo as JPEG.",
    };
  if (!type || !IMAGES.includes(type))
    return { ok: false, reason: "This is not a photo in JPEG, PNG, WebP or AVIF form." };
  const scaled = (side: number, quality: number) =>
    sharp(bytes, { limitInputPixels: MAX_PIXELS, failOn: "error" })
      .autoOrient()
      .resize({ width: side, height: side, fit: "inside", withoutEnlargement: true })
      .webp({ quality })
      .toBuffer({ resolveWithObject: true });
  try {
    const display = await scaled(DISPLAY_PX, 82);
    const thumbnail = await scaled(THUMBNAIL_PX, 74);
    const { width, height } = display.info;
    return {
      ok: true,
      image: { display: new Uint8Array(display.data), thumbnail: new Uint8Array(thumbnail.data), width, height },
    };
  } catch (error) {
    const isTooLarge = error instanceof Error && error.message.includes("pixel limit");
    return {
      ok: false,
      reason: isTooLarge
        ? "This photo has more than 100 megapixels. Send a smaller one."
        : "This photo is damaged and can't be read. Take or send it again.",
    };
  }
}
