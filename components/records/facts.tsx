import type { FactView } from "@/components/customers/model";

/** Facts of a record, a line each; what is not known is said so. */
export function Facts({ facts }: { facts: readonly FactView[] }) {
  return (
    <dl className="kv">
      {facts.map((fact) => (
        <div key={fact.label}>
          <dt>{fact.label}</dt>
          <dd className={fact.isMono && fact.value ? "num rec-wrap" : undefined}>
            {fact.value ? (
              fact.href ? (
                <a className="link" href={fact.href}>
                  {fact.value}
                </a>
              ) : (
                fact.value
              )
            ) : (
              <span className="faint">not given</span>
            )}
          </dd>
        </div>
      ))}
    </dl>
  );
}
