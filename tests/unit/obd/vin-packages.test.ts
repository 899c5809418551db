import { createRequire } from "node:module";
import { describe, expect, it } from "vitest";
import { checkVin } from "@/lib/obd/vin";

const require = createRequire(import.meta.url);
const validator = require("vin-validator") as { validate(vin: string): boolean };
const generator = require("vin-generator") as { generateVin(): string };

/** A repeatable stream of numbers (Park and Miller's minimal standard generator). */
function numbers(seed: number): () => number {
  let state = seed;
  return () => {
    state = (state * 48271) % 2147483647;
    return state / 2147483647;
  };
}

describe("the check digit against two independent packages", () => {
  it("agrees with a validator on 3,000 numbers, right and wrong", () => {
    const next = numbers(20260101);
    const letters = "ABCDEFGHJKLMNPRSTUVWXYZ0123456789";
    let right = 0;
    for (let i = 0; i < 3000; i++) {
      let vin = "";
      for (let k = 0; k < 17; k++)
        vin +=
          k === 8
            ? "0123456789X"[Math.floor(next() * 11)]
            : k === 9
              ? "K"
              : letters[Math.floor(next() * letters.length)];
      const ours = checkVin(vin).state === "valid";
      expect(ours, vin).toBe(validator.validate(vin));
      if (ours) right++;
    }
    expect(right).toBeGreaterThan(150);
  });
  it("accepts what a generator makes", () => {
    for (let i = 0; i < 200; i++) {
      const vin = generator.generateVin();
      expect(checkVin(vin).expectedCheckDigit, vin).toBe(vin[8]);
    }
  });
});
