"use client";

import { type Density, setDensity, setTheme, type ThemeChoice, useDensity, useTheme } from "./device";
import { Options } from "./options";

/** Day, night, or as the device is set. */
export function ThemeSwitch() {
  return (
    <Options
      legend="Light"
      showLegend
      name="fd-theme"
      value={useTheme()}
      onChange={(value) => setTheme(value as ThemeChoice)}
      options={[
        { value: "device", label: "As the device" },
        { value: "day", label: "Day" },
        { value: "night", label: "Night" },
      ]}
    />
  );
}

/** Dense for the counter, large for gloves. */
export function DensitySwitch({ server }: { server?: Density }) {
  return (
    <Options
      legend="Where you are"
      showLegend
      name="fd-density"
      value={useDensity(server)}
      onChange={(value) => setDensity(value as Density)}
      options={[
        { value: "counter", label: "Counter" },
        { value: "bay", label: "Bay, with gloves" },
      ]}
    />
  );
}
