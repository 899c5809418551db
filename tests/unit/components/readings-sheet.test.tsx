// @vitest-environment jsdom
import { act, cleanup, fireEvent, render, screen } from "@testing-library/react";
import { afterEach, beforeEach, describe, expect, it, vi } from "vitest";
import type { CellChange, SampleView, SheetContext } from "@/components/readings/model";
import { ReadingsSheet } from "@/components/readings/readings-sheet";
import { useSheet } from "@/components/readings/use-sheet";
import { AnnouncerProvider } from "@/components/ui/announcer";

const context: SheetContext = {
  vehicle: {
    cylinders: 4,
    banks: 1,
    fuelSystem: "port",
    airMetering: "maf",
    o2Sensing: "switching",
    ignition: "coil-on-plug",
  },
  units: { pressure: "kPa", temperature: "C", distance: "km" },
  timeZone: "UTC",
};
const sample = (id: string, mode: SampleView["mode"], values: SampleView["values"]): SampleView => ({
  id,
  mode,
  phase: "before",
  how: null,
  takenAt: "2026-12-01T13:02:00Z",
  takenBy: "Bram Ferrule",
  values,
});

type Save = (
  sampleId: string,
  changes: CellChange[],
) => Promise<
  | { ok: true }
  | {
      ok: false;
      message: string;
      conflict?: { by: string; cells: { parameter: string; yours: unknown; theirs: unknown }[] };
    }
>;

function Sheet({ samples, save, units }: { samples: SampleView[]; save: Save; units?: SheetContext["units"] }) {
  const sheet = useSheet(samples, save);
  return (
    <>
      <ReadingsSheet
        samples={samples}
        values={sheet.values}
        context={units ? { ...context, units } : context}
        onCommit={sheet.commit}
      />
      <output>{sheet.conflict ? `conflict with ${sheet.conflict.by}` : sheet.state.kind}</output>
      <button type="button" onClick={() => sheet.settle("mine")}>
        mine
      </button>
    </>
  );
}

const idling = sample("s1", "idling", { RPM: 780, SHRTFT1: 14.1, LONGFT1: 10.2 });
const cruising = sample("s2", "cruising", {});
const cell = (label: string) => screen.getByLabelText(label) as HTMLInputElement;

function show(save: Save = async () => ({ ok: true }), samples = [idling, cruising], units?: SheetContext["units"]) {
  render(
    <AnnouncerProvider>
      <Sheet samples={samples} save={save} units={units} />
    </AnnouncerProvider>,
  );
}

beforeEach(() => {
  vi.useFakeTimers({ toFake: ["setTimeout", "clearTimeout", "setInterval", "clearInterval"] });
});
afterEach(() => {
  cleanup();
  vi.useRealTimers();
});
const settle = () => act(async () => void (await vi.advanceTimersByTimeAsync(1000)));

describe("the readings sheet", () => {
  it("moves down with Enter and the arrows, and skips computed rows", () => {
    show();
    cell("Short trim, bank 1, idling").focus();
    fireEvent.keyDown(document.activeElement!, { key: "Enter" });
    expect(document.activeElement).toBe(cell("Long trim, bank 1, idling"));
    // The total stands between long trim and the sensor, and can't be focused.
    fireEvent.keyDown(document.activeElement!, { key: "ArrowDown" });
    expect(document.activeElement).toBe(cell("Front O2, mean, idling"));
    fireEvent.keyDown(document.activeElement!, { key: "ArrowUp" });
    expect(document.activeElement).toBe(cell("Long trim, bank 1, idling"));
  });

  it("moves to the next sample from the edge of a cell only", () => {
    show();
    const field = cell("Engine speed, idling");
    field.focus();
    field.setSelectionRange(1, 1);
    fireEvent.keyDown(field, { key: "ArrowRight" });
    expect(document.activeElement).toBe(field);
    field.setSelectionRange(field.value.length, field.value.length);
    fireEvent.keyDown(field, { key: "ArrowRight" });
    expect(document.activeElement).toBe(cell("Engine speed, cruising"));
  });

  it("restores with Esc what the cell held", () => {
    show();
    const field = cell("Short trim, bank 1, idling");
    field.focus();
    fireEvent.change(field, { target: { value: "99" } });
    fireEvent.keyDown(field, { key: "Escape" });
    expect(field.value).toBe("14.1");
  });

  it("saves a cell with what the writer saw, after a pause", async () => {
    const save = vi.fn<Save>(async () => ({ ok: true }));
    show(save);
    const field = cell("Short trim, bank 1, idling");
    field.focus();
    fireEvent.change(field, { target: { value: "3,5" } });
    fireEvent.blur(field);
    expect(save).not.toHaveBeenCalled();
    await settle();
    expect(save).toHaveBeenCalledWith("s1", [{ parameter: "SHRTFT1", was: 14.1, now: 3.5 }]);
    expect(field.value).toBe("+3.5");
  });

  it("clears a reading to not taken", async () => {
    const save = vi.fn<Save>(async () => ({ ok: true }));
    show(save);
    const field = cell("Engine speed, idling");
    field.focus();
    fireEvent.change(field, { target: { value: "" } });
    fireEvent.blur(field);
    await settle();
    expect(save).toHaveBeenCalledWith("s1", [{ parameter: "RPM", was: 780, now: null }]);
  });

  it("flags an impossible value at the keystroke, keeps it as typed, and offers the likely one", async () => {
    const save = vi.fn<Save>(async () => ({ ok: true }));
    show(save);
    const field = cell("Coolant, cruising");
    field.focus();
    // SAE J1979 service 01 PID 05: one byte less 40, so −40 to 215 °C.
    fireEvent.change(field, { target: { value: "215" } });
    expect(field.getAttribute("aria-invalid")).toBeNull();
    fireEvent.change(field, { target: { value: "910" } });
    expect(field.getAttribute("aria-invalid")).toBe("true");
    expect(screen.getByText(/range ends at 215 °C/, { selector: ".pop p" })).toBeTruthy();
    expect(document.querySelector('[data-announcer="assertive"]')?.textContent).toContain("Not possible");
    fireEvent.click(screen.getByRole("button", { name: "Use 91.0" }));
    expect(field.value).toBe("91");
    await settle();
    expect(save).toHaveBeenCalledWith("s2", [{ parameter: "ECT", was: null, now: 91 }]);
  });

  it("colours what is outside its band, and only that", () => {
    show();
    const out = cell("Short trim, bank 1, idling");
    expect(out.className).toContain("dev");
    expect(out.closest("td")?.className).toContain("lean");
    expect(cell("Engine speed, idling").className).not.toContain("dev");
  });

  it("computes total trim from what was typed", () => {
    show();
    // 14.1 + 10.2, by hand.
    expect(screen.getByText("+24.3")).toBeTruthy();
  });

  it("pastes a column downwards and tells what it left out", async () => {
    const save = vi.fn<Save>(async () => ({ ok: true }));
    show(save);
    const field = cell("Engine speed, cruising");
    field.focus();
    fireEvent.paste(field, { clipboardData: { getData: () => "2010\r\n14.2\r\nx\r\n" } });
    await settle();
    expect(save).toHaveBeenCalledWith("s2", [
      { parameter: "RPM", was: null, now: 2010 },
      { parameter: "MAF", was: null, now: 14.2 },
    ]);
    expect(document.querySelector('[data-announcer="polite"]')?.textContent).toContain(
      "2 readings pasted, 1 were no numbers",
    );
  });

  it("takes and shows the shop's units and keeps SI inside", async () => {
    const save = vi.fn<Save>(async () => ({ ok: true }));
    show(save, [sample("s1", "idling", { ECT: 100 })], { pressure: "psi", temperature: "F", distance: "mi" });
    // Water boils at 100 °C, 212 °F.
    expect(cell("Coolant, idling").value).toBe("212");
    const fuel = cell("Fuel pressure, idling");
    fuel.focus();
    fireEvent.change(fuel, { target: { value: "55" } });
    fireEvent.blur(fuel);
    await settle();
    const [, changes] = save.mock.calls[0]!;
    // 1 psi = 6.894757 kPa (NIST SP 811), so 55 psi = 379.2 kPa.
    expect(changes[0]?.now).toBeCloseTo(379.2116, 3);
  });

  it("shows a conflict, and writes mine over theirs only when told to", async () => {
    const save = vi.fn<Save>(async () => ({ ok: true }));
    save.mockResolvedValueOnce({
      ok: false,
      message: "x",
      conflict: { by: "Sela Moth", cells: [{ parameter: "RPM", yours: 800, theirs: 760 }] },
    });
    show(save);
    const field = cell("Engine speed, idling");
    field.focus();
    fireEvent.change(field, { target: { value: "800" } });
    fireEvent.blur(field);
    await settle();
    expect(screen.getByText("conflict with Sela Moth")).toBeTruthy();
    expect(save).toHaveBeenCalledTimes(1);
    fireEvent.click(screen.getByText("mine"));
    await settle();
    expect(save).toHaveBeenLastCalledWith("s1", [{ parameter: "RPM", was: 760, now: 800 }]);
  });

  it("tries a failed save again and loses nothing", async () => {
    const save = vi.fn<Save>(async () => ({ ok: true }));
    save.mockRejectedValueOnce(new Error("network"));
    show(save);
    const field = cell("Engine speed, idling");
    field.focus();
    fireEvent.change(field, { target: { value: "800" } });
    fireEvent.blur(field);
    await settle();
    expect(screen.getByText("failed")).toBeTruthy();
    await act(async () => void (await vi.advanceTimersByTimeAsync(6000)));
    expect(save).toHaveBeenCalledTimes(2);
    expect(save).toHaveBeenLastCalledWith("s1", [{ parameter: "RPM", was: 780, now: 800 }]);
    expect(screen.getByText("saved")).toBeTruthy();
  });
});
