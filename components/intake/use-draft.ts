"use client";

import { useCallback, useEffect, useRef, useState } from "react";

interface Kept<T> {
  at: string;
  value: T;
}

/**
 * Keeps what is being typed on this device until it is sent. `save` waits for a pause of half a second; `savedAt` is
 * when it last wrote. Storage that is closed or full only means no draft.
 */
export function useDraft<T>(key: string) {
  const [savedAt, setSavedAt] = useState<string | null>(null);
  const timer = useRef<ReturnType<typeof setTimeout>>(undefined);

  const read = useCallback((): T | null => {
    try {
      const text = localStorage.getItem(key);
      if (!text) return null;
      const kept = JSON.parse(text) as Kept<T>;
      setSavedAt(kept.at);
      return kept.value;
    } catch {
      return null;
    }
  }, [key]);

  const save = useCallback(
    (value: T) => {
      clearTimeout(timer.current);
      timer.current = setTimeout(() => {
        const at = new Date().toISOString();
        try {
          localStorage.setItem(key, JSON.stringify({ at, value } satisfies Kept<T>));
          setSavedAt(at);
        } catch {
          setSavedAt(null);
        }
      }, 500);
    },
    [key],
  );

  const clear = useCallback(() => {
    clearTimeout(timer.current);
    try {
      localStorage.removeItem(key);
    } catch {
      // Nothing was kept.
    }
    setSavedAt(null);
  }, [key]);

  useEffect(() => () => clearTimeout(timer.current), []);
  return { savedAt, read, save, clear };
}
