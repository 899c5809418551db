"use client";

import { useSyncExternalStore } from "react";
import { SaveState } from "@/components/ui/save-state";
import { saving } from "./act";

const START = { kind: "saved" } as const;

export function LiveSaveState() {
  const state = useSyncExternalStore(saving.subscribe, saving.get, () => START);
  return <SaveState state={state} />;
}
