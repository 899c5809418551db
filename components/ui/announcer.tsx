"use client";

import { createContext, type ReactNode, useCallback, useContext, useState } from "react";

type Announce = (text: string, urgency?: "polite" | "assertive") => void;
const Context = createContext<Announce>(() => {});

/** Two live regions for the whole page: what was saved or re-ordered (polite), what is impossible (assertive). */
export function AnnouncerProvider({ children }: { children: ReactNode }) {
  const [polite, setPolite] = useState("");
  const [assertive, setAssertive] = useState("");
  const announce = useCallback<Announce>((text, urgency = "polite") => {
    const set = urgency === "assertive" ? setAssertive : setPolite;
    // A repeated sentence must differ, or it is not read again.
    set((was) => (was === text ? `${text}\u00a0` : text));
  }, []);
  return (
    <Context value={announce}>
      {children}
      <div className="vh" aria-live="polite" data-announcer="polite">
        {polite}
      </div>
      <div className="vh" aria-live="assertive" data-announcer="assertive">
        {assertive}
      </div>
    </Context>
  );
}

export function useAnnounce(): Announce {
  return useContext(Context);
}
