import { describe, expect, it } from "vitest";
import {
  differences,
  type EditField,
  EntryError,
  entryOf,
  entryText,
  withValue,
} from "@/components/records/edit-fields";
import { settingsOf, shopFormValues, valuesOf } from "@/components/settings/shop-form-values";
import { shopSettings } from "@/lib/shops/schema";

const form = (values: Record<string, string>) => {
  const data = new FormData();
  for (const [name, value] of Object.entries(values)) data.append(name, value);
  return data;
};

describe("fields of a record's dialog", () => {
  const price: EditField = { kind: "money", name: "priceMinor", label: "Price", currency: "USD" };
  const yen: EditField = { kind: "money", name: "priceMinor", label: "Price", currency: "JPY" };
  const hours: EditField = { kind: "number", name: "hoursMilli", label: "Hours", scale: 1000 };

  it("reads money in the currency's own minor unit (ISO 4217: cents for USD, none for JPY)", () => {
    expect(entryOf(price, form({ priceMinor: "$1,180.50" }))).toBe(118_050);
    expect(entryOf(yen, form({ priceMinor: "1180" }))).toBe(1180);
    expect(entryText(price, 118_050)).toBe("1180.50");
    expect(() => entryOf(price, form({ priceMinor: "1.005" }))).toThrow(EntryError);
    expect(() => entryOf(price, form({ priceMinor: "" }))).toThrow("Price is missing.");
  });

  it("keeps hours as whole thousandths, whatever binary fractions make of them", () => {
    expect(entryOf(hours, form({ hoursMilli: "2.4" }))).toBe(2400);
    expect(entryOf(hours, form({ hoursMilli: "1,1" }))).toBe(1100);
    expect(entryOf(hours, form({ hoursMilli: "0.7" }))).toBe(700);
    expect(entryText(hours, 2400)).toBe("2.4");
  });

  it("tells no from not known", () => {
    const egr: EditField = { kind: "yes-no", name: "engine.hasEgr", label: "EGR", optional: true };
    expect(entryOf(egr, form({ "engine.hasEgr": "no" }))).toBe(false);
    expect(entryOf(egr, form({ "engine.hasEgr": "" }))).toBeUndefined();
  });

  it("puts a value into its place and leaves the rest, and the original, as they were", () => {
    const engine = { id: "veh_1", engine: { cylinders: 4, fuel: "E10" } };
    expect(withValue(engine, "engine.cylinders", 6)).toEqual({ id: "veh_1", engine: { cylinders: 6, fuel: "E10" } });
    expect(withValue(engine, "engine.fuel", undefined)).toEqual({ id: "veh_1", engine: { cylinders: 4 } });
    expect(engine).toEqual({ id: "veh_1", engine: { cylinders: 4, fuel: "E10" } });
  });

  it("sets two versions side by side, the differing fields only", () => {
    const fields: EditField[] = [{ kind: "text", name: "name", label: "Name" }, price];
    const yours = { name: "Gasket set", priceMinor: 6420 };
    expect(differences(fields, yours, { name: "Gasket set", priceMinor: 6190 })).toEqual([
      { label: "Price", yours: "64.20", theirs: "61.90", numeric: true },
    ]);
    expect(differences(fields, yours, { ...yours, version: 8 })).toEqual([]);
  });
});

describe("the settings as they are typed", () => {
  const kept = shopSettings.parse({ taxBasisPoints: 825, bands: { RPM: { low: 600 } } });
  const typed = valuesOf("Quillon Yard", kept);

  it("come back as they were, the usual bands too, which the form does not show", () => {
    expect(settingsOf(shopFormValues.parse(typed), kept)).toEqual(kept);
  });

  it.each([
    ["taxPercent", "eight"],
    ["taxPercent", "101"],
    ["taxPercent", "8.255"],
    ["ceiling", "a lot"],
    ["quoteValidDays", "0"],
    ["quoteValidDays", "7.5"],
    ["currency", "EURO"],
    ["timeZone", "Quillon/Yard"],
    ["dayCloses", "07:00"],
    ["email", "desk"],
  ] as const)("refuse %s of “%s” at its field", (name, value) => {
    const result = shopFormValues.safeParse({ ...typed, [name]: value });
    expect(result.error?.issues.map((issue) => issue.path[0])).toContain(name);
  });

  it("keep a tax of 8.25 % as 825 hundredths of a per cent", () => {
    expect(typed.taxPercent).toBe("8.25");
    expect(settingsOf({ ...typed, taxPercent: "8,25" }, kept).taxBasisPoints).toBe(825);
  });
});
