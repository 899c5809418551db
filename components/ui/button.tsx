import Link from "next/link";
import type { AnchorHTMLAttributes, ButtonHTMLAttributes, ReactNode } from "react";
import { cx } from "./cx";

type Look = "act" | "quiet" | "ink" | "link";
const LOOKS: Record<Look, string> = { act: "btn", quiet: "btn quiet", ink: "btn ink", link: "link" };

export interface ButtonProps extends Omit<ButtonHTMLAttributes<HTMLButtonElement>, "children"> {
  look?: Look;
  small?: boolean;
  /** While true the label becomes `busyLabel`, the width is kept and a second press is ignored. */
  busy?: boolean;
  busyLabel?: string;
  children: ReactNode;
}

/** Says what happens. A disabled button needs its reason in words beside it: see `WhyOff`. */
export function Button({
  look = "act",
  small,
  busy,
  busyLabel,
  className,
  children,
  onClick,
  type,
  ...rest
}: ButtonProps) {
  return (
    <button
      {...rest}
      type={type ?? "button"}
      className={cx(LOOKS[look], small && "small", className)}
      aria-busy={busy || undefined}
      onClick={busy ? (event) => event.preventDefault() : onClick}
    >
      {busyLabel ? (
        <span className="swap">
          <span data-off={busy || undefined} aria-hidden={busy || undefined}>
            {children}
          </span>
          <span data-off={!busy || undefined} aria-hidden={!busy || undefined}>
            {busyLabel}
          </span>
        </span>
      ) : (
        children
      )}
    </button>
  );
}

export interface ButtonLinkProps extends AnchorHTMLAttributes<HTMLAnchorElement> {
  href: string;
  look?: Look;
  small?: boolean;
  children: ReactNode;
}

/** A link that looks like a button: it goes somewhere. */
export function ButtonLink({ href, look = "act", small, className, children, ...rest }: ButtonLinkProps) {
  return (
    <Link {...rest} href={href} className={cx(LOOKS[look], small && "small", className)}>
      {children}
    </Link>
  );
}

/** The reason beside a disabled control; point `aria-describedby` at its id. */
export function WhyOff({ id, children }: { id: string; children: ReactNode }) {
  return (
    <span className="whyoff" id={id}>
      {children}
    </span>
  );
}
