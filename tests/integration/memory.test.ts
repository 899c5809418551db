import { describe, expect, it } from "vitest";
import { inShop } from "@/db/client";
import { assess } from "@/lib/diagnosis/assess";
import { parseCaseFile } from "@/lib/diagnosis/case-file";
import { openCase } from "@/lib/services/cases/open";
import { shopMemory } from "@/lib/services/causes/memory";
import { asDatabaseOwner, caseAsked, ENGINE, INTAKE, makeTestShop, type TestShop } from "../helpers/shop";

const remembered = (shop: TestShop, except = "none") =>
  inShop(shop.as("owner"), (tx) => shopMemory(tx, shop.shopId, except));

/** Closes a case by hand: the way there is tested elsewhere. */
const close = (shop: TestShop, caseId: string) =>
  asDatabaseOwner((client) =>
    client.query("update cases set stage = 'closed' where shop_id = $1 and id = $2", [shop.shopId, caseId]),
  );

describe("what a shop's closed cases say", () => {
  it("counts proven causes of closed cases, its own only", async () => {
    const [shop, other] = [await makeTestShop(), await makeTestShop()];
    const asked = await caseAsked(shop);
    expect((await remembered(shop)).entries).toEqual([]);
    await close(shop, asked.caseId);
    expect((await remembered(shop)).entries).toEqual([
      { complaintFamily: "idle", fuelSystem: "port", causes: { "intake-air-leak": 1 } },
    ]);
    expect((await remembered(shop, asked.caseId)).entries).toEqual([]);
    expect((await remembered(other)).entries).toEqual([]);
  });

  it("takes the count away when the case comes back", async () => {
    const shop = await makeTestShop();
    const asked = await caseAsked(shop);
    await close(shop, asked.caseId);
    await shop.do(openCase, "writer", { ...INTAKE, comebackOf: asked.caseId });
    expect((await remembered(shop)).entries).toEqual([]);
  });

  it("moves the prior of a like case towards what was found here", () => {
    const parsed = parseCaseFile({ version: 1, vehicle: { ...ENGINE }, complaints: ["rough-idle"] });
    if (!parsed.ok) throw new Error("the case file does not fit");
    const probability = (count: number) => {
      const memory = {
        entries: [{ complaintFamily: "idle", fuelSystem: "port", causes: { "brake-booster-leak": count } }],
      };
      return (
        assess(parsed.caseFile, { memory }).causes.find((cause) => cause.id === "brake-booster-leak")?.probability ?? 0
      );
    };
    expect(probability(10)).toBeGreaterThan(probability(0));
  });
});
