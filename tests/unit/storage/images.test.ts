import sharp from "sharp";
import { describe, expect, it, vi } from "vitest";
import { processImage } from "@/lib/storage/images";
import { sniff } from "@/lib/storage/sniff";

// papers, servers and pictures take their time on a busy machine
vi.setConfig({ testTimeout: 180_000, hookTimeout: 60_000 });

const red = { r: 200, g: 30, b: 30 };
const blue = { r: 20, g: 30, b: 200 };
/** A picture whose left half is red and whose right half is blue. */
const halves = async (width: number, height: number) => {
  const left = await sharp({ create: { width: Math.floor(width / 2), height, channels: 3, background: red } })
    .png()
    .toBuffer();
  return sharp({ create: { width, height, channels: 3, background: blue } }).composite([
    { input: left, left: 0, top: 0 },
  ]);
};
const bytes = (text: string) => new TextEncoder().encode(text);

describe("sniff", () => {
  it("knows a file by its bytes", async () => {
    const image = await halves(64, 32);
    expect(sniff(await image.clone().jpeg().toBuffer())).toBe("image/jpeg");
    expect(sniff(await image.clone().png().toBuffer())).toBe("image/png");
    expect(sniff(await image.clone().webp().toBuffer())).toBe("image/webp");
    expect(sniff(await image.clone().avif().toBuffer())).toBe("image/avif");
    expect(sniff(bytes("%PDF-1.7\n"))).toBe("application/pdf");
    expect(sniff(bytes("time;rpm\n0,1;800 r/min – warm\n"))).toBe("text/plain");
    expect(sniff(new Uint8Array([0x54, 0x65, 0x6d, 0x70, 0xb0, 0x43]))).toBe("text/plain"); // "Temp°C" in ISO 8859-1
  });

  // the ftyp box of ISO/IEC 14496-12 with the brand of ISO/IEC 23008-12
  it("knows HEIC in order to refuse it", () => {
    const box = Buffer.concat([
      Buffer.from([0, 0, 0, 24]),
      Buffer.from("ftypheic"),
      Buffer.alloc(4),
      Buffer.from("mif1heic"),
      Buffer.alloc(40),
    ]);
    expect(sniff(box)).toBe("image/heic");
  });

  it("takes nothing else", () => {
    expect(sniff(new Uint8Array())).toBeUndefined();
    expect(sniff(new Uint8Array([0x7f, 0x45, 0x4c, 0x46, 2, 1, 1, 0]))).toBeUndefined(); // a program
    expect(sniff(new Uint8Array([0x50, 0x4b, 3, 4, 0, 0]))).toBeUndefined(); // an archive
    expect(sniff(bytes("text\u0000with a zero"))).toBeUndefined();
  });
});

describe("processImage", () => {
  it("turns a photo upright and leaves out all the camera wrote, the place included", async () => {
    // orientation 6 of the EXIF standard: to be turned a quarter clockwise for viewing
    const photo = await (await halves(400, 200))
      .jpeg()
      .withExif({
        IFD0: { Make: "Camera", Orientation: "6" },
        IFD3: { GPSLatitudeRef: "N", GPSLatitude: "51/1 30/1 0/1" },
      })
      .withMetadata({ orientation: 6 })
      .toBuffer();
    expect((await sharp(photo).metadata()).exif).toBeDefined();
    const result = await processImage(photo);
    if (!result.ok) throw new Error(result.reason);
    const meta = await sharp(result.image.display).metadata();
    expect([meta.format, meta.width, meta.height, meta.exif, meta.orientation]).toEqual([
      "webp",
      200,
      400,
      undefined,
      undefined,
    ]);
    expect([result.image.width, result.image.height]).toEqual([200, 400]);
    // what was left is on top now
    const { data } = await sharp(result.image.display)
      .extract({ left: 100, top: 20, width: 1, height: 1 })
      .raw()
      .toBuffer({ resolveWithObject: true });
    expect(data[0]).toBeGreaterThan(data[2]!);
  });

  it("makes a display picture of at most 1600 and a thumbnail of at most 320 pixels, and enlarges nothing", async () => {
    const large = await processImage(await (await halves(3000, 1200)).jpeg().toBuffer());
    if (!large.ok) throw new Error(large.reason);
    expect((await sharp(large.image.display).metadata()).width).toBe(1600);
    expect((await sharp(large.image.thumbnail).metadata()).width).toBe(320);
    const small = await processImage(await (await halves(100, 50)).png().toBuffer());
    if (!small.ok) throw new Error(small.reason);
    expect([small.image.width, (await sharp(small.image.thumbnail).metadata()).width]).toEqual([100, 100]);
  });

  it("says in words why it refuses", async () => {
    const heic = Buffer.concat([Buffer.from([0, 0, 0, 16]), Buffer.from("ftypheic"), Buffer.alloc(20)]);
    expect(await processImage(heic)).toMatchObject({ ok: false, reason: expect.stringContaining("HEIC") });
    expect(await processImage(bytes("%PDF-1.7"))).toMatchObject({
      ok: false,
      reason: expect.stringContaining("not a photo"),
    });
    const whole = await (await halves(300, 300)).jpeg().toBuffer();
    expect(await processImage(whole.subarray(0, whole.length / 2))).toMatchObject({
      ok: false,
      reason: expect.stringContaining("damaged"),
    });
    // a header that claims 60,000 by 60,000 pixels (PNG specification, IHDR), as a small file can
    const bomb = Buffer.from(await (await halves(16, 16)).png().toBuffer());
    bomb.writeUInt32BE(60_000, 16);
    bomb.writeUInt32BE(60_000, 20);
    expect((await processImage(bomb)).ok).toBe(false);
  });
});
