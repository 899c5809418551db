import { Tick } from "./icons";

export type SaveStateView =
  | { kind: "saved"; at?: string }
  | { kind: "saving" }
  | { kind: "kept"; count: number }
  | { kind: "failed"; reason: string };

export interface SaveStateProps {
  state: SaveStateView;
  /** "Draft saved" on a form that is not sent yet. */
  word?: string;
}

/** The state of saving, read out politely. `at` is a clock time as it should be shown. */
export function SaveState({ state, word }: SaveStateProps) {
  return (
    <span className="sync" role="status">
      {state.kind === "saved" && (
        <>
          <Tick />
          {word ? `${word} ${state.at ?? ""}` : state.at ? `Saved ${state.at}` : "All saved"}
        </>
      )}
      {state.kind === "saving" && "Saving"}
      {state.kind === "kept" && `${state.count} kept here`}
      {state.kind === "failed" && (
        <span className="alarm" title={state.reason}>
          Not saved: {state.reason}
        </span>
      )}
    </span>
  );
}
