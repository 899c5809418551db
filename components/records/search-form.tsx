import Link from "next/link";
import { Button } from "@/components/ui/button";

export interface SearchFormProps {
  action: string;
  label: string;
  placeholder: string;
  query: string;
  /** What else the address holds and a search keeps. */
  keep?: Readonly<Record<string, string>>;
  clearHref: string;
}

/** A search that lives in the address; it works without scripts. */
export function SearchForm({ action, label, placeholder, query, keep = {}, clearHref }: SearchFormProps) {
  return (
    <search>
      <form className="rec-search" action={action}>
        {Object.entries(keep).map(([name, value]) => (
          <input key={name} type="hidden" name={name} value={value} />
        ))}
        <input
          className="input"
          type="search"
          name="q"
          maxLength={100}
          defaultValue={query}
          aria-label={label}
          placeholder={placeholder}
        />
        <Button look="quiet" type="submit">
          Find
        </Button>
        {query && (
          <Link className="link" href={clearHref}>
            Show all
          </Link>
        )}
      </form>
    </search>
  );
}

/** "Show 50 more", and the way back to the first rows. */
export function MoreLink({ href, firstHref }: { href: string | null; firstHref: string | null }) {
  if (!href && !firstHref) return null;
  return (
    <p className="showmore acts">
      {href && (
        <Link className="btn quiet" href={href}>
          Show 50 more
        </Link>
      )}
      {firstHref && (
        <Link className="link" href={firstHref}>
          Back to the first
        </Link>
      )}
    </p>
  );
}
