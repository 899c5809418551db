import { isParameterId, PARAMETERS, type ParameterId } from "@/lib/obd/parameters";
import { missingPart, unusableReason } from "./bands";
import type { CaseFile, CylinderReadings, Sample } from "./case-file";
import { MODES, type Mode } from "./vocabulary";

export interface Note {
  path: string;
  message: string;
}

/** A reading that may be used, with the path it came by. */
export interface Reading {
  value: number;
  path: string;
  mode: Mode;
  sample: number;
}

/** The samples taken as found, stripped of what means nothing; every loss is noted. */
export class Readings {
  readonly notes: Note[] = [];
  private readonly numbers = new Map<string, Reading[]>();
  private readonly cylinders = new Map<
    string,
    { values: CylinderReadings; path: string; mode: Mode; sample: number }[]
  >();
  private readonly loops: { value: string; path: string; mode: Mode; sample: number; parameter: string }[] = [];

  constructor(readonly caseFile: CaseFile) {
    for (const index of inFixedOrder(caseFile.samples)) {
      const sample = caseFile.samples[index] as Sample;
      if (sample.phase !== "after") this.take(sample, index, `samples[${index}].values`);
    }
    this.takeFreezeFrames();
  }

  private take(sample: Sample, index: number, base: string): void {
    const { vehicle } = this.caseFile;
    for (const [key, value] of Object.entries(sample.values)) {
      const path = `${base}.${key}`;
      if (!isParameterId(key)) {
        this.notes.push({ path, message: "Not a parameter of the vocabulary: kept, not used." });
        continue;
      }
      const { kind } = PARAMETERS[key];
      if (kind === "loop") {
        if (missingPart(key, vehicle)) this.notes.push({ path, message: missingPart(key, vehicle) ?? "" });
        else if (typeof value === "string")
          this.loops.push({ value, path, mode: sample.mode, sample: index, parameter: key });
      } else if (kind === "number" && typeof value === "number") {
        const reason = unusableReason(key, value, vehicle);
        if (reason !== null) this.notes.push({ path, message: reason });
        else push(this.numbers, key, { value, path, mode: sample.mode, sample: index });
      } else if (kind === "cylinders" && value !== null && typeof value === "object") {
        const kept: CylinderReadings = {};
        for (const [cylinder, v] of Object.entries(value as CylinderReadings)) {
          const at = `${path}.${cylinder}`;
          const reason = unusableReason(key, v, vehicle);
          if (vehicle.cylinders !== undefined && Number(cylinder) > vehicle.cylinders)
            this.notes.push({ path: at, message: `This engine has ${vehicle.cylinders} cylinders` });
          else if (reason !== null) this.notes.push({ path: at, message: reason });
          else kept[cylinder] = v;
        }
        if (Object.keys(kept).length > 0)
          push(this.cylinders, key, { values: kept, path, mode: sample.mode, sample: index });
      }
    }
  }

  /** What the control unit froze stands in for a mode that nobody measured. */
  private takeFreezeFrames(): void {
    const byCode = this.caseFile.codes
      .map((code, index) => ({ code, index }))
      .sort((a, b) => (a.code.code < b.code.code ? -1 : 1));
    byCode.forEach(({ code, index }) => {
      if (!code.freezeFrame) return;
      const v = code.freezeFrame.values;
      const n = (id: ParameterId) => (typeof v[id] === "number" ? (v[id] as number) : undefined);
      const rpm = n("RPM");
      if (rpm === undefined) return;
      const moving = (n("VSS") ?? 0) > 3;
      const mode: Mode = moving
        ? (n("LOAD_PCT") ?? 0) >= 80
          ? "accelerating"
          : "cruising"
        : rpm < 1200
          ? "idling"
          : "raised-idle";
      if (this.caseFile.samples.some((s) => s.mode === mode && s.phase !== "after")) return;
      this.take({ mode, phase: "before", values: v }, -1 - index, `codes[${index}].freezeFrame.values`);
    });
  }

  note(path: string, message: string): void {
    if (!this.notes.some((n) => n.path === path && n.message === message)) this.notes.push({ path, message });
  }

  all(id: ParameterId, modes?: readonly Mode[]): Reading[] {
    const found = this.numbers.get(id) ?? [];
    return modes ? found.filter((r) => modes.includes(r.mode)) : found;
  }

  /** The last reading in the first of the modes that has one. */
  one(id: ParameterId, ...modes: Mode[]): Reading | undefined {
    for (const mode of modes) {
      const found = this.all(id, [mode]).at(-1);
      if (found) return found;
    }
    return modes.length === 0 ? this.all(id).at(-1) : undefined;
  }

  /** The reading beside another, in the same sample. */
  beside(id: ParameterId, other: { sample: number }): Reading | undefined {
    return this.numbers.get(id)?.find((r) => r.sample === other.sample);
  }

  byCylinder(id: ParameterId) {
    return this.cylinders.get(id) ?? [];
  }

  loopOf(sample: number) {
    return this.loops.find((l) => l.sample === sample && l.parameter === "FUELSYS1");
  }

  allLoops() {
    return this.loops.filter((l) => l.parameter === "FUELSYS1");
  }
}

/**
 * Samples in the order of the modes and, inside a mode, of their own content, so that the order they were typed in
 * decides nothing. Where one reading is wanted and several stand there, subjects take the last of this order.
 */
function inFixedOrder(samples: readonly Sample[]): number[] {
  const keys = new Map<number, string>();
  const key = (i: number): string => {
    let text = keys.get(i);
    if (text === undefined) {
      text = JSON.stringify(Object.entries(samples[i]?.values ?? {}).sort(([a], [b]) => (a < b ? -1 : 1)));
      keys.set(i, text);
    }
    return text;
  };
  const rank = (i: number) => MODES.indexOf((samples[i] as Sample).mode);
  return samples
    .map((_, i) => i)
    .sort((a, b) => rank(a) - rank(b) || (key(a) < key(b) ? -1 : key(a) > key(b) ? 1 : a - b));
}

function push<T>(map: Map<string, T[]>, key: string, item: T): void {
  const list = map.get(key);
  if (list) list.push(item);
  else map.set(key, [item]);
}
