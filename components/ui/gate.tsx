import type { ReactNode } from "react";
import { Tick } from "./icons";

export interface GateItem {
  label: string;
  isMet: boolean;
  /** What is missing, or who has it: "waiting on Odile Tansy". */
  note?: string;
}

export interface GateProps {
  items: readonly GateItem[];
  /** The button for the next stage. */
  action?: ReactNode;
  /** Put the button after the list (the bay) instead of before. */
  actionLast?: boolean;
}

/** What the next stage demands: ticked where it is there, named with who has it where it is not. */
export function Gate({ items, action, actionLast }: GateProps) {
  return (
    <div className="gate">
      {!actionLast && action}
      <TodoList items={items} />
      {actionLast && action}
    </div>
  );
}

export function TodoList({ items }: { items: readonly GateItem[] }) {
  return (
    <ul className="todo">
      {items.map((item) => (
        <li key={item.label}>
          {item.isMet ? <Tick /> : <i />}
          <span>
            <span className="vh">{item.isMet ? "There: " : "Missing: "}</span>
            {item.isMet ? item.label : <b>{item.label}</b>}
            {item.note && <span className="faint"> {item.note}</span>}
          </span>
        </li>
      ))}
    </ul>
  );
}
