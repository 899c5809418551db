"use client";

import type { UseFormRegister } from "react-hook-form";
import { Select, TextInput } from "@/components/ui/inputs";
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
import type { NewCaseValues } from "./form-schema";

const choices = <T extends string>(values: readonly T[], labels: Record<T, string>) =>
  values.map((value) => ({ value, label: labels[value] }));

/** What the assessment must know of the engine. Nothing here is demanded: an old or rare one may lack any of it. */
export function EngineFields({ register }: { register: UseFormRegister<NewCaseValues> }) {
  return (
    <details className="wide engine">
      <summary className="link">Engine and fuel system</summary>
      <div className="fg three">
        <TextInput
          id="displacementL"
          label="Displacement"
          unit="L"
          mono
          inputMode="decimal"
          {...register("engine.displacementL")}
        />
        <TextInput id="cylinders" label="Cylinders" mono inputMode="numeric" {...register("engine.cylinders")} />
        <TextInput id="banks" label="Banks" mono inputMode="numeric" {...register("engine.banks")} />
        <Select
          id="fuelSystem"
          label="Fuel"
          placeholder="not known"
          options={choices(FUEL_SYSTEMS, FUEL_SYSTEM_LABELS)}
          {...register("engine.fuelSystem")}
        />
        <Select
          id="airMetering"
          label="Air measured by"
          placeholder="not known"
          options={choices(AIR_METERINGS, AIR_METERING_LABELS)}
          {...register("engine.airMetering")}
        />
        <Select
          id="aspiration"
          label="Charging"
          placeholder="not known"
          options={choices(ASPIRATIONS, ASPIRATION_LABELS)}
          {...register("engine.aspiration")}
        />
        <Select
          id="ignition"
          label="Ignition"
          placeholder="not known"
          options={choices(IGNITIONS, IGNITION_LABELS)}
          {...register("engine.ignition")}
        />
        <Select
          id="o2Sensing"
          label="Front oxygen sensor"
          placeholder="not known"
          options={choices(O2_SENSINGS, O2_SENSING_LABELS)}
          {...register("engine.o2Sensing")}
        />
        <Select
          id="fuel"
          label="Set for"
          placeholder="not known"
          options={choices(FUELS, FUEL_LABELS)}
          {...register("engine.fuel")}
        />
        <Select
          id="hybrid"
          label="Hybrid or stop-start"
          placeholder="no"
          options={[{ value: "yes", label: "yes, may start itself" }]}
          {...register("engine.hybrid")}
        />
      </div>
    </details>
  );
}
