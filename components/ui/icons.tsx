/** The few drawn signs. The typefaces have no arrows or ticks. All are decoration: the words beside them carry the sense. */
export function Tick() {
  return (
    <svg className="in" width="11" height="9" viewBox="0 0 11 9" aria-hidden="true">
      <path d="M1 4.5 4 7.5 10 1" fill="none" stroke="currentColor" strokeWidth="1.6" />
    </svg>
  );
}

export function Arrow({ wide = false }: { wide?: boolean }) {
  return wide ? (
    <svg className="in" width="22" height="8" viewBox="0 0 22 8" aria-hidden="true">
      <path d="M0 4h20M17 1l3 3-3 3" fill="none" stroke="currentColor" strokeWidth="1.3" />
    </svg>
  ) : (
    <svg className="in" width="16" height="8" viewBox="0 0 16 8" aria-hidden="true">
      <path d="M0 4h14M11 1l3 3-3 3" fill="none" stroke="currentColor" strokeWidth="1.3" />
    </svg>
  );
}

export function Cross() {
  return (
    <svg className="in" width="9" height="9" viewBox="0 0 9 9" aria-hidden="true">
      <path d="M1 1l7 7m0-7l-7 7" fill="none" stroke="currentColor" strokeWidth="1.4" />
    </svg>
  );
}

export function UpKey() {
  return (
    <svg className="in" width="8" height="9" viewBox="0 0 8 9" aria-hidden="true">
      <path d="M4 8.5V1M1.2 3.8 4 1l2.8 2.8" fill="none" stroke="currentColor" strokeWidth="1.2" />
    </svg>
  );
}

export function DownKey() {
  return (
    <svg className="in" width="8" height="9" viewBox="0 0 8 9" aria-hidden="true">
      <path d="M4 .5V8M1.2 5.2 4 8l2.8-2.8" fill="none" stroke="currentColor" strokeWidth="1.2" />
    </svg>
  );
}

export function ChainLink() {
  return (
    <svg width="40" height="14" viewBox="0 0 40 14" aria-hidden="true">
      <path d="M0 7h12m16 0h12" stroke="currentColor" />
      <rect x="8.5" y="3.5" width="13" height="7" rx="3.5" fill="none" stroke="currentColor" strokeWidth="1.5" />
      <rect x="18.5" y="3.5" width="13" height="7" rx="3.5" fill="none" stroke="currentColor" strokeWidth="1.5" />
    </svg>
  );
}

/** The alarm square. */
export function Bang() {
  return (
    <span className="bang" aria-hidden="true">
      !
    </span>
  );
}
