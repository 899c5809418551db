import type { Mode } from "../vocabulary";
import type { FindingSheet } from "./sheet";

/** High-pressure rail against its command. */
export function rail(f: FindingSheet): void {
  const compare = (mode: Mode) => {
    const is = f.r.one("FRP", mode);
    const wanted = is && f.r.beside("frpCommandedKPa", is);
    return is && wanted && wanted.value > 0 ? { is, wanted, ratio: is.value / wanted.value } : null;
  };
  const idle = compare("idling") ?? compare("raised-idle") ?? compare("cruising") ?? compare("starting");
  const load = compare("accelerating");
  const at = [load, idle].flatMap((x) => (x ? [x.is, x.wanted] : []));
  if (!idle && !load) return;
  const low = (x: typeof idle) => x !== null && x.ratio < 0.88;
  if (idle && low(idle))
    f.sign(
      "rail",
      load && !low(load) ? ["low"] : ["low"],
      `Rail ${idle.is.value} of ${idle.wanted.value} kPa commanded`,
      at,
      true,
      "rail",
      "lean",
    );
  else if (load && low(load))
    f.sign(
      "rail",
      idle ? ["low-at-load"] : ["low-at-load", "low"],
      `Rail ${load.is.value} of ${load.wanted.value} kPa commanded under load`,
      at,
      true,
      "rail",
      "lean",
    );
  else if ((idle?.ratio ?? load?.ratio ?? 1) > 1.15)
    f.sign("rail", ["high"], "Rail pressure above command", at, true, "rail", "rich");
  else f.sign("rail", ["as-commanded"], "Rail pressure follows its command", at, false, "rail");
  const lowSide = f.r.one("lowSideFuelKPa");
  if (lowSide && !f.found.some((f) => f.kind === "test" && f.test === "fuel-pressure")) {
    const bad = lowSide.value < 300;
    f.test(
      "fuel-pressure",
      [bad ? "low" : "in-spec"],
      `Low-side fuel pressure ${lowSide.value} kPa${bad ? ": low" : ""}`,
      [lowSide],
      bad,
      "fuel-supply",
      bad ? "lean" : null,
    );
  }
}
