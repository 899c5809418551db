"use client";

import { Button } from "@/components/ui/button";
import { ErrorState } from "@/components/ui/states";

/** A fault of ours: what did not happen, what is still true, what to do. */
export default function StaffError({ error, reset }: { error: Error & { digest?: string }; reset: () => void }) {
  return (
    <main id="main" className="main">
      <h1 className="vh">This page did not load</h1>
      <ErrorState
        title="This page did not load"
        requestId={error.digest}
        acts={<Button onClick={reset}>Load it again</Button>}
      >
        Nothing was changed, and what was saved is still there.
      </ErrorState>
    </main>
  );
}
