import { beforeAll, describe, expect, it } from "vitest";
import { mayDo, type PERMISSIONS, type Role } from "@/lib/auth/permissions";
import { VERBS } from "@/lib/services/registry";
import { perform } from "@/lib/services/verb";
import { makeTestShop, type TestShop } from "../helpers/shop";

/**
 * The table of `architecture`: who may do what. Written out here by hand, apart from the code's own table, so that a
 * change of one is noticed in the other.
 */
const WRITTEN: Record<string, string> = {
  "case.open": "owner writer technician",
  "case.editIntake": "owner writer technician",
  "case.authorizeDiagnosis": "owner writer",
  "case.assign": "owner writer",
  "case.promise": "owner writer",
  "case.note": "owner writer technician",
  "case.advance": "owner writer technician",
  "case.back": "owner writer technician",
  "case.park": "owner writer technician",
  "case.unpark": "owner writer technician",
  "case.waiveProof": "owner",
  "case.close": "owner writer",
  "case.release": "owner writer",
  "readings.addSample": "owner writer technician",
  "readings.set": "owner writer technician",
  "readings.describe": "owner writer technician",
  "readings.removeSample": "owner writer technician",
  "readings.addCode": "owner writer technician",
  "readings.removeCode": "owner writer technician",
  "readings.readiness": "owner writer technician",
  "readings.import": "owner writer technician",
  "test.record": "owner writer technician",
  "test.undo": "owner writer technician",
  "cause.mark": "owner technician",
  "cause.unmark": "owner technician",
  "quote.saveDraft": "owner writer",
  "quote.addJob": "owner writer technician",
  "quote.addSetJob": "owner writer technician",
  "quote.saveJob": "owner writer technician",
  "quote.removeJob": "owner writer",
  "quote.send": "owner writer",
  "quote.withdraw": "owner writer",
  "approval.give": "customer",
  "approval.record": "owner writer",
  "quote.ask": "customer",
  "quote.reply": "owner writer",
  "clock.on": "owner writer technician",
  "clock.off": "owner writer technician",
  "clock.correct": "owner",
  "work.usePart": "owner writer technician",
  "work.setPart": "owner writer technician",
  "work.removePart": "owner writer technician",
  "work.finish": "owner writer technician",
  "work.strike": "owner writer",
  "payment.record": "owner writer",
  "customer.save": "owner writer",
  "vehicle.save": "owner writer technician",
  "price.saveRate": "owner writer",
  "price.saveOperation": "owner writer",
  "price.savePart": "owner writer",
  "price.saveSetJob": "owner writer",
  "shop.saveSettings": "owner",
  "file.register": "owner writer technician",
  "file.describe": "owner writer technician",
  "file.process": "system",
};

const ROLES: Role[] = ["owner", "writer", "technician", "customer", "system"];
let shop: TestShop;

beforeAll(async () => {
  shop = await makeTestShop();
});

describe("who may do what", () => {
  it("names every verb of the product, and no other", () => {
    expect([...VERBS.keys()].sort()).toEqual(Object.keys(WRITTEN).sort());
  });

  for (const [name, roles] of Object.entries(WRITTEN)) {
    for (const role of ROLES) {
      const isAllowed = roles.split(" ").includes(role);
      it(`${isAllowed ? "lets" : "refuses"} ${role} ${name}`, async () => {
        const verb = VERBS.get(name);
        if (!verb) throw new Error(`no verb ${name}`);
        // an empty input is refused by its shape where the role may act, and by the role before that where it may not
        const outcome = await perform(verb, shop.as(role), {}).then(
          () => "done",
          (error: { code?: string; name?: string }) => error.code ?? error.name ?? "error",
        );
        if (isAllowed) expect(outcome).not.toBe("forbidden");
        else expect(outcome).toBe("forbidden");
      });
    }
  }

  it("refuses an unknown role and an unknown action", () => {
    expect(mayDo("admin" as Role, "case.read")).toBe(false);
    expect(mayDo("owner", "nothing.known" as keyof typeof PERMISSIONS)).toBe(false);
  });
});
