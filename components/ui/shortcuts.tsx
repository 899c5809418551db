"use client";

import { type ReactNode, useEffect, useRef, useState } from "react";
import { Dialog } from "./dialog";

export interface Shortcut {
  /** "/", "n", "g r", "Ctrl+Enter". Letters are lower case. */
  keys: string;
  what: string;
  run: () => void;
}

function isTyping(target: EventTarget | null): boolean {
  return (
    target instanceof HTMLElement && (target.isContentEditable || /^(INPUT|TEXTAREA|SELECT)$/.test(target.tagName))
  );
}

/**
 * Keyboard shortcuts of a page. Letters and signs work only outside fields; chords with Ctrl (or Cmd) work in fields
 * too. Sequences ("g r") must follow within a second and a half.
 */
export function useShortcuts(shortcuts: readonly Shortcut[]) {
  const latest = useRef(shortcuts);
  const pending = useRef<{ key: string; at: number } | null>(null);
  useEffect(() => {
    latest.current = shortcuts;
  });
  useEffect(() => {
    function onKeyDown(event: KeyboardEvent) {
      if (event.defaultPrevented || event.isComposing || event.altKey) return;
      const key = event.key.length === 1 ? event.key.toLowerCase() : event.key;
      if (event.ctrlKey || event.metaKey) {
        const chord = latest.current.find((shortcut) => shortcut.keys === `Ctrl+${event.key}`);
        if (chord) {
          event.preventDefault();
          chord.run();
        }
        return;
      }
      if (isTyping(event.target) || document.querySelector("dialog[open]")) return;
      const first = pending.current;
      pending.current = null;
      const sequence = first && event.timeStamp - first.at < 1500 ? `${first.key} ${key}` : null;
      const hit =
        latest.current.find((shortcut) => shortcut.keys === sequence) ??
        latest.current.find((shortcut) => shortcut.keys === key);
      if (hit) {
        event.preventDefault();
        hit.run();
      } else if (latest.current.some((shortcut) => shortcut.keys.startsWith(`${key} `))) {
        pending.current = { key, at: event.timeStamp };
      }
    }
    document.addEventListener("keydown", onKeyDown);
    return () => document.removeEventListener("keydown", onKeyDown);
  }, []);
}

export interface ShortcutHelpProps {
  shortcuts: readonly { keys: string; what: string }[];
  open: boolean;
  onClose: () => void;
}

export function ShortcutHelp({ shortcuts, open, onClose }: ShortcutHelpProps) {
  return (
    <Dialog open={open} onClose={onClose} title="Keys">
      <dl className="keys-list">
        {shortcuts.map((shortcut) => (
          <div key={shortcut.keys} className="contents">
            <dt>
              {shortcut.keys.split(/[ +]/).map((key) => (
                <kbd key={key}>{key.length === 1 ? key.toUpperCase() : key}</kbd>
              ))}
            </dt>
            <dd>{shortcut.what}</dd>
          </div>
        ))}
      </dl>
      <p className="note">Letters work only outside fields.</p>
    </Dialog>
  );
}

export interface StaffShortcutsProps {
  /** Parts of the case in view, if there is one. */
  parts?: { readings?: string; causes?: string; quote?: string; proof?: string };
  go: (href: string) => void;
  extra?: readonly Shortcut[];
  children?: ReactNode;
}

/** The staff's shortcuts on every page: `/` find, `N` new case, `G R/C/Q/P` parts, `?` the list. */
export function StaffShortcuts({ parts = {}, go, extra = [], children }: StaffShortcutsProps) {
  const [isHelpOpen, setHelpOpen] = useState(false);
  const list: Shortcut[] = [
    { keys: "/", what: "find", run: () => document.querySelector<HTMLInputElement>("[data-find]")?.focus() },
    { keys: "n", what: "new case", run: () => go("/cases/new") },
    ...(parts.readings ? [{ keys: "g r", what: "readings", run: () => go(parts.readings!) }] : []),
    ...(parts.causes ? [{ keys: "g c", what: "causes", run: () => go(parts.causes!) }] : []),
    ...(parts.quote ? [{ keys: "g q", what: "quote", run: () => go(parts.quote!) }] : []),
    ...(parts.proof ? [{ keys: "g p", what: "proof", run: () => go(parts.proof!) }] : []),
    ...extra,
    { keys: "?", what: "this list", run: () => setHelpOpen(true) },
  ];
  useShortcuts(list);
  return (
    <>
      {children}
      <ShortcutHelp shortcuts={list} open={isHelpOpen} onClose={() => setHelpOpen(false)} />
    </>
  );
}
