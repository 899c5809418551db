import Link from "next/link";
import type { PartLink } from "./nav-model";
import { Words } from "./words";

/** The parts of a case at the left, each with one line that tells its state. */
export function Spine({ parts }: { parts: readonly PartLink[] }) {
  return (
    <nav className="spine" aria-label="Parts of the case">
      {parts.map((part) => (
        <Link key={part.href} href={part.href} aria-current={part.current ? "page" : undefined}>
          <b>{part.label}</b>
          <span>
            <Words>{part.state}</Words>
          </span>
        </Link>
      ))}
    </nav>
  );
}
