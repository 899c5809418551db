import type { Choice, EditField } from "@/components/records/edit-fields";
import type { CaseVehicle } from "@/lib/diagnosis/case-file";
import {
  AIR_METERING_LABELS,
  AIR_METERINGS,
  ASPIRATION_LABELS,
  ASPIRATIONS,
  FUEL_LABELS,
  FUEL_SYSTEM_LABELS,
  FUEL_SYSTEMS,
  FUELS,
  IGNITION_LABELS,
  IGNITIONS,
  O2_SENSING_LABELS,
  O2_SENSINGS,
} from "@/lib/diagnosis/vocabulary";

interface VehicleFacts {
  label: string;
  plate: string | null;
  vin: string | null;
  modelYear: number | null;
  note: string | null;
}

/** What tells one vehicle from another. */
export function vehicleFields(known: VehicleFacts): EditField[] {
  return [
    {
      kind: "text",
      name: "label",
      label: "Make, model and engine",
      value: known.label,
      max: 80,
      hint: "As it reads in every list.",
    },
    { kind: "number", name: "modelYear", label: "Model year", value: known.modelYear, optional: true },
    { kind: "text", name: "plate", label: "Plate", value: known.plate, mono: true, max: 16, optional: true },
    {
      kind: "text",
      name: "vin",
      label: "VIN",
      value: known.vin,
      mono: true,
      max: 20,
      optional: true,
      hint: "17 characters. A US or Canadian number is checked before it is kept.",
    },
    { kind: "area", name: "note", label: "Note", value: known.note, max: 1000, optional: true },
  ];
}

const choices = <T extends string>(values: readonly T[], labels: Record<T, string>): Choice[] =>
  values.map((value) => ({ value, label: labels[value] }));

/** What the assessment asks of an engine. Nothing is demanded: an old or rare one may lack any of it. */
export function engineFields(engine: CaseVehicle): EditField[] {
  const unknown = { placeholder: "not known", optional: true } as const;
  return [
    {
      kind: "number",
      name: "engine.displacementL",
      label: "Displacement",
      unit: "L",
      value: engine.displacementL,
      optional: true,
    },
    { kind: "number", name: "engine.cylinders", label: "Cylinders", value: engine.cylinders, optional: true },
    {
      kind: "number",
      name: "engine.banks",
      label: "Banks",
      value: engine.banks,
      optional: true,
      hint: "An in-line engine has one.",
    },
    {
      kind: "choice",
      name: "engine.fuelSystem",
      label: "Fuel",
      value: engine.fuelSystem,
      options: choices(FUEL_SYSTEMS, FUEL_SYSTEM_LABELS),
      ...unknown,
    },
    {
      kind: "choice",
      name: "engine.fuelReturn",
      label: "Fuel return",
      value: engine.fuelReturn,
      options: [
        { value: "return", label: "With a return line" },
        { value: "returnless", label: "Returnless" },
      ],
      ...unknown,
    },
    {
      kind: "choice",
      name: "engine.airMetering",
      label: "Air measured by",
      value: engine.airMetering,
      options: choices(AIR_METERINGS, AIR_METERING_LABELS),
      ...unknown,
    },
    {
      kind: "choice",
      name: "engine.aspiration",
      label: "Charging",
      value: engine.aspiration,
      options: choices(ASPIRATIONS, ASPIRATION_LABELS),
      ...unknown,
    },
    {
      kind: "choice",
      name: "engine.throttleControl",
      label: "Throttle",
      value: engine.throttleControl,
      options: [
        { value: "cable", label: "By cable" },
        { value: "electronic", label: "Electronic" },
      ],
      ...unknown,
    },
    {
      kind: "choice",
      name: "engine.ignition",
      label: "Ignition",
      value: engine.ignition,
      options: choices(IGNITIONS, IGNITION_LABELS),
      ...unknown,
    },
    {
      kind: "choice",
      name: "engine.o2Sensing",
      label: "Front oxygen sensor",
      value: engine.o2Sensing,
      options: choices(O2_SENSINGS, O2_SENSING_LABELS),
      ...unknown,
    },
    {
      kind: "choice",
      name: "engine.fuel",
      label: "Set for",
      value: engine.fuel,
      options: choices(FUELS, FUEL_LABELS),
      ...unknown,
    },
    { kind: "yes-no", name: "engine.hasEgr", label: "Exhaust gas recirculation", value: engine.hasEgr, optional: true },
    {
      kind: "yes-no",
      name: "engine.hasSecondaryAir",
      label: "Secondary air",
      value: engine.hasSecondaryAir,
      optional: true,
    },
    {
      kind: "yes-no",
      name: "engine.variableCamTiming",
      label: "Variable cam timing",
      value: engine.variableCamTiming,
      optional: true,
    },
    {
      kind: "yes-no",
      name: "engine.hybrid",
      label: "Hybrid or stop-start",
      value: engine.hybrid,
      optional: true,
      hint: "Then it may start itself: every test says so.",
    },
  ];
}
