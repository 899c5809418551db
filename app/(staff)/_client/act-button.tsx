"use client";

import { useRouter } from "next/navigation";
import { useRef, useState } from "react";
import { Button, type ButtonProps } from "@/components/ui/button";
import { act, sentenceOf } from "./act";

export interface ActButtonProps {
  label: string;
  busyLabel?: string;
  look?: ButtonProps["look"];
  verb: string;
  input: Record<string, unknown>;
  goTo?: string;
  disabled?: boolean;
}

/** A button that does one act at once; a refusal is said beside it. */
export function ActButton({ label, busyLabel, look = "act", verb, input, goTo, disabled }: ActButtonProps) {
  const router = useRouter();
  const key = useRef<string | null>(null);
  const [isBusy, setBusy] = useState(false);
  const [failure, setFailure] = useState("");
  return (
    <>
      <Button
        look={look}
        disabled={disabled}
        busy={isBusy}
        busyLabel={busyLabel}
        onClick={async () => {
          key.current ??= crypto.randomUUID();
          setBusy(true);
          setFailure("");
          const answer = await act(verb, input, key.current);
          key.current = null;
          setBusy(false);
          if (!answer.ok) return setFailure(sentenceOf(answer.problem));
          if (goTo) router.push(goTo);
          router.refresh();
        }}
      >
        {label}
      </Button>
      {failure && (
        <span className="why" role="alert">
          <span className="bang" aria-hidden="true">
            !
          </span>
          <span>{failure}</span>
        </span>
      )}
    </>
  );
}
