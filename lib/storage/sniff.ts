export type SniffedType =
  | "image/jpeg"
  | "image/png"
  | "image/webp"
  | "image/avif"
  | "image/heic"
  | "application/pdf"
  | "text/plain";

const ascii = (bytes: Uint8Array, from: number, to: number) => String.fromCharCode(...bytes.subarray(from, to));

const startsWith = (bytes: Uint8Array, signature: readonly number[]) =>
  signature.every((byte, index) => bytes[index] === byte);

/** Brands of the ISO base media format (ISO/IEC 23008-12, and the AV1 image format), in the `ftyp` box. */
const HEIC_BRANDS = ["heic", "heix", "hevc", "hevx", "heim", "heis", "mif1", "msf1"];

/** How much of a text is looked at. */
const TEXT_PROBE = 65_536;

function isText(bytes: Uint8Array): boolean {
  const probe = bytes.subarray(0, TEXT_PROBE);
  // control characters other than tab, line feed, form feed and carriage return do not occur in text
  if (probe.some((byte) => byte < 9 || (byte > 13 && byte < 32 && byte !== 27) || byte === 11)) return false;
  try {
    // a character may be cut at the end of the probe, which "stream" allows
    new TextDecoder("utf-8", { fatal: true }).decode(probe, { stream: true });
    return true;
  } catch {
    // single-byte texts of older tools: letters above 127 are fine, the C1 controls are not
    return !probe.some((byte) => byte >= 0x80 && byte < 0xa0);
  }
}

/**
 * What a file is by its first bytes, whatever its name or the browser says; undefined for anything that is not taken.
 * HEIC is named so that it can be refused with a reason.
 */
export function sniff(bytes: Uint8Array): SniffedType | undefined {
  if (bytes.length === 0) return undefined;
  if (startsWith(bytes, [0xff, 0xd8, 0xff])) return "image/jpeg";
  if (startsWith(bytes, [0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a])) return "image/png";
  if (ascii(bytes, 0, 4) === "RIFF" && ascii(bytes, 8, 12) === "WEBP") return "image/webp";
  if (ascii(bytes, 0, 5) === "%PDF-") return "application/pdf";
  if (ascii(bytes, 4, 8) === "ftyp") {
    const box = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength).getUint32(0);
    const brands = ascii(bytes, 8, Math.min(box, bytes.length, 64)).match(/.{4}/g) ?? [];
    if (brands.some((brand) => brand === "avif" || brand === "avis")) return "image/avif";
    if (brands.some((brand) => HEIC_BRANDS.includes(brand))) return "image/heic";
    return undefined;
  }
  return isText(bytes) ? "text/plain" : undefined;
}
