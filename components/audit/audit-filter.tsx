import { Button, ButtonLink } from "@/components/ui/button";
import { Select, TextInput } from "@/components/ui/inputs";

type Choice = { value: string; label: string };

export interface AuditFilterProps {
  action: string;
  people: readonly Choice[];
  kinds: readonly Choice[];
  values: { who: string; kind: string; day: string };
  /** No later day has an entry. */
  today: string;
}

/** Who, what and which day; the choice lives in the address, so it works without scripts and can be sent on. */
export function AuditFilter({ action, people, kinds, values, today }: AuditFilterProps) {
  const isSet = Boolean(values.who || values.kind || values.day);
  return (
    <div className="filters">
      <form action={action} className="filterform" key={`${values.who}|${values.kind}|${values.day}`}>
        <Select id="au-who" name="who" label="Who" placeholder="Anyone" options={people} defaultValue={values.who} />
        <Select
          id="au-kind"
          name="kind"
          label="To what"
          placeholder="Anything"
          options={kinds}
          defaultValue={values.kind}
        />
        <TextInput id="au-day" name="day" type="date" label="On" max={today} defaultValue={values.day} />
        <Button look="quiet" type="submit">
          Show
        </Button>
        {isSet && (
          <ButtonLink look="link" href={action}>
            Show all
          </ButtonLink>
        )}
      </form>
    </div>
  );
}
