const PITCH = 340;
const BORE = 148;

function Bore({ at, isLit }: { at: number; isLit: boolean }) {
  const cx = 150 + at * PITCH;
  const intake = [cx - 62.2, cx + 62.2];
  const exhaust = [cx - 56.2, cx + 56.2];
  return (
    <g className={isLit ? "lit" : undefined}>
      <circle className="k" cx={cx} cy="0" r={BORE} />
      <circle className="h" cx={cx} cy="0" r={BORE + 11} />
      {intake.map((x) => (
        <g key={x}>
          <circle className="k" cx={x} cy="-59.2" r="53.3" />
          <circle className="h" cx={x} cy="-59.2" r="45.3" />
        </g>
      ))}
      {exhaust.map((x) => (
        <g key={x}>
          <circle className="k" cx={x} cy="68.1" r="44.4" />
          <circle className="h" cx={x} cy="68.1" r="37.4" />
        </g>
      ))}
      <circle className="h" cx={cx} cy="4.4" r="20" />
      <circle className="pl" cx={cx} cy="4.4" r={isLit ? 9 : 6.7} />
      <path className="h" d={`M${cx - 174} 0H${cx + 174}M${cx} -174V174`} strokeDasharray="14 4 3 4" />
    </g>
  );
}

/** The fire deck of a four-valve head, drawn as on a workshop print; one plug is lit. */
export function DeckArt() {
  const bolts = [0, 1, 2, 3].map((index) => -20 + index * PITCH);
  const bores = [0, 1, 2, 3];
  return (
    <div className="deckart">
      <svg className="art" viewBox="0 0 900 900" preserveAspectRatio="xMinYMid slice" aria-hidden="true">
        <g transform="translate(150 450)">
          <path className="k" d="M-62 -262H1400V262H-62q-26 0-26-26V-236q0-26 26-26z" />
          <path className="h" d="M-50 -246H1400V246H-50q-22 0-22-22V-224q0-22 22-22z" />
          {bores.map((index) => (
            <Bore key={index} at={index} isLit={index === 1} />
          ))}
          {bolts.map((x) => (
            <g key={x}>
              <circle className="k" cx={x} cy="-206" r="17" />
              <circle className="h" cx={x} cy="-206" r="10" />
              <circle className="k" cx={x} cy="206" r="17" />
              <circle className="h" cx={x} cy="206" r="10" />
              <rect className="h" x={x - 6} y="-140" width="12" height="40" rx="6" />
              <rect className="h" x={x - 6} y="100" width="12" height="40" rx="6" />
            </g>
          ))}
          {bores.flatMap((index) =>
            [43, 101, 165, 223].map((offset) => (
              <g key={`${index}-${offset}`}>
                <rect className="h" x={offset + index * PITCH} y="-209" width="34" height="13" rx="6.5" />
                <rect className="h" x={offset + index * PITCH} y="198.5" width="34" height="13" rx="6.5" />
              </g>
            )),
          )}
          <path className="h" d="M150 300V330M490 300V330M150 322H490" />
          <path className="h" d="M156 318l-6 4 6 4M484 318l6 4-6 4" />
          <text x="320" y="314" textAnchor="middle" className="mm">
            96.0
          </text>
          <text x="-88" y="-284">
            Fire deck, seen from the piston
          </text>
        </g>
      </svg>
    </div>
  );
}
