import { ButtonLink } from "@/components/ui/button";
import { EmptyState } from "@/components/ui/states";

export default function StaffNotFound() {
  return (
    <main id="main" className="main">
      <h1 className="vh">Not found</h1>
      <EmptyState title="There is no such page here" acts={<ButtonLink href="/cases">To the cases</ButtonLink>}>
        The number may be mistyped, or the record belongs to another shop.
      </EmptyState>
    </main>
  );
}
