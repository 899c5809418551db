"use client";

import { type ReactNode, useEffect, useId, useRef } from "react";
import { cx } from "./cx";

export interface DialogProps {
  open: boolean;
  onClose: () => void;
  title: string;
  children: ReactNode;
  wide?: boolean;
}

/**
 * The browser's own dialog: it traps focus, closes on Esc and gives focus back to what opened it.
 * Its content is not kept while closed, so a form inside starts fresh.
 */
export function Dialog({ open, onClose, title, children, wide }: DialogProps) {
  const ref = useRef<HTMLDialogElement>(null);
  const opener = useRef<Element | null>(null);
  const headId = useId();

  useEffect(() => {
    const dialog = ref.current;
    if (!dialog) return;
    if (open && !dialog.open) {
      opener.current = document.activeElement;
      dialog.showModal();
    } else if (!open && dialog.open) {
      dialog.close();
    }
  }, [open]);

  return (
    <dialog
      ref={ref}
      className={cx("dialog", wide && "wide")}
      aria-labelledby={headId}
      onClose={() => {
        onClose();
        if (opener.current instanceof HTMLElement && opener.current.isConnected) opener.current.focus();
      }}
    >
      {open && (
        <>
          <header>
            <h2 id={headId}>{title}</h2>
            <button type="button" className="link" onClick={() => ref.current?.close()}>
              Close
            </button>
          </header>
          {children}
        </>
      )}
    </dialog>
  );
}
