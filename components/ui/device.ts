"use client";

import { useSyncExternalStore } from "react";

/**
 * Theme and density belong to the device: kept in local storage, mirrored in a cookie (so that the server can render
 * the bay at once) and in data attributes on the root element, which the stylesheet reads. `public/theme.js` sets the
 * attributes before first paint.
 */
export type ThemeChoice = "day" | "night" | "device";
export type Density = "counter" | "bay";
export const DENSITY_COOKIE = "fd-density";

const EVENT = "fd-device";

function read(key: string): string | null {
  try {
    return localStorage.getItem(key);
  } catch {
    return null;
  }
}

function write(key: string, value: string | null) {
  try {
    if (value === null) localStorage.removeItem(key);
    else localStorage.setItem(key, value);
  } catch {
    // Storage may be closed to us; the choice then lasts for this page.
  }
}

function subscribe(onChange: () => void): () => void {
  window.addEventListener(EVENT, onChange);
  window.addEventListener("storage", onChange);
  return () => {
    window.removeEventListener(EVENT, onChange);
    window.removeEventListener("storage", onChange);
  };
}

export function setTheme(choice: ThemeChoice) {
  write("fd-theme", choice === "device" ? null : choice);
  const dark = matchMedia("(prefers-color-scheme: dark)").matches;
  document.documentElement.dataset.theme = choice === "night" || (choice === "device" && dark) ? "night" : "day";
  window.dispatchEvent(new Event(EVENT));
}

export function setDensity(density: Density) {
  write("fd-density", density);
  // biome-ignore lint/suspicious/noDocumentCookie: the Cookie Store API is not in every browser yet
  document.cookie = `${DENSITY_COOKIE}=${density}; path=/; max-age=31536000; samesite=lax`;
  document.documentElement.dataset.density = density;
  window.dispatchEvent(new Event(EVENT));
}

export function useTheme(): ThemeChoice {
  return useSyncExternalStore(
    subscribe,
    () => {
      const kept = read("fd-theme");
      return kept === "day" || kept === "night" ? kept : "device";
    },
    () => "device",
  );
}

/** The density in force. `server` is what the cookie said when the page was rendered. */
export function useDensity(server: Density = "counter"): Density {
  return useSyncExternalStore(
    subscribe,
    () => (document.documentElement.dataset.density === "bay" ? "bay" : "counter"),
    () => server,
  );
}
