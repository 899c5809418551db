/**
 * Readiness monitors, PIDs 01 and 41. Source: SAE J1979 / ISO 15031-5; the compression-ignition names of bytes C and D
 * are from memory of the same standard.
 */

export interface Monitor {
  id: string;
  label: string;
  /** PID 01: fitted. PID 41: able to finish in this driving cycle. */
  supported: boolean;
  /** True when its test has finished; an unsupported monitor counts as finished. */
  ready: boolean;
}

export interface MonitorStatus {
  scope: "since-clear" | "this-cycle";
  /** The lamp as commanded, and the number of stored codes (0 to 127); null for PID 41, which does not say. */
  mil: boolean | null;
  codeCount: number | null;
  ignition: "spark" | "compression";
  monitors: Monitor[];
}

type Names = readonly (readonly [id: string, label: string] | null)[];

const CONTINUOUS: Names = [
  ["MIS", "misfire"],
  ["FUEL", "fuel system"],
  ["CCM", "comprehensive components"],
];
const SPARK: Names = [
  ["CAT", "catalyst"],
  ["HCAT", "heated catalyst"],
  ["EVAP", "evaporative system"],
  ["AIR", "secondary air"],
  ["ACRF", "air-conditioning refrigerant, or particulate filter by newer editions"],
  ["O2S", "oxygen sensor"],
  ["HTR", "oxygen sensor heater"],
  ["EGR/VVT", "EGR and/or valve timing"],
];
const COMPRESSION: Names = [
  ["HCCAT", "hydrocarbon catalyst"],
  ["NCAT", "NOx after-treatment"],
  null,
  ["BP", "boost pressure"],
  null,
  ["EGS", "exhaust gas sensor"],
  ["PM", "particulate filter"],
  ["EGR/VVT", "EGR and/or valve timing"],
];

/**
 * Four bytes of PID 01 (`scope` "since-clear") or PID 41 ("this-cycle") → lamp, code count, monitors in bit order.
 *
 * @param bytes A to D, each 0 to 255
 * @returns the status, and what the standard does not allow for, such as a reserved bit or an absent monitor that says
 *   it is unfinished (which is left out of what is not ready)
 * @throws RangeError when there are not four bytes
 */
export function decodeMonitors(
  bytes: readonly number[],
  scope: MonitorStatus["scope"],
): { status: MonitorStatus; oddities: string[] } {
  const [a, b, c, d] = bytes;
  if (a === undefined || b === undefined || c === undefined || d === undefined || bytes.length !== 4) {
    throw new RangeError("monitor status needs four bytes");
  }
  const oddities: string[] = [];
  const monitors: Monitor[] = [];
  const take = (names: Names, supportedBits: number, openBits: number) => {
    names.forEach((name, bit) => {
      const supported = ((supportedBits >> bit) & 1) === 1;
      const open = ((openBits >> bit) & 1) === 1;
      if (!name) {
        if (supported || open) oddities.push(`reserved monitor bit ${bit} is set`);
        return;
      }
      if (open && !supported) oddities.push(`${name[0]} is not supported but reads unfinished`);
      monitors.push({ id: name[0], label: name[1], supported, ready: !(supported && open) });
    });
  };
  const ignition = b & 0x08 ? "compression" : "spark";
  take(CONTINUOUS, b & 7, (b >> 4) & 7);
  take(ignition === "spark" ? SPARK : COMPRESSION, c, d);
  if (b & 0x80) oddities.push("reserved bit 7 of byte B is set");
  const sinceClear = scope === "since-clear";
  if (!sinceClear && a !== 0) oddities.push("byte A of PID 41 is not zero");
  return {
    status: {
      scope,
      mil: sinceClear ? (a & 0x80) !== 0 : null,
      codeCount: sinceClear ? a & 0x7f : null,
      ignition,
      monitors,
    },
    oddities,
  };
}
