import { ButtonLink } from "@/components/ui/button";
import { EmptyState } from "@/components/ui/states";
import { pageCtx } from "@/lib/auth/session";
import { readShop } from "@/lib/services/shops/read";
import { StaffTop } from "./_views/staff-top";

export default async function StaffNotFound() {
  const ctx = await pageCtx();
  const { shop } = await readShop(ctx);
  return (
    <>
      <StaffTop ctx={ctx} shop={shop.name} current="cases" />
      <main id="main" className="main">
        <h1 className="vh">Not found</h1>
        <EmptyState
          title="There is nothing here by that number"
          acts={<ButtonLink href="/cases">To the cases</ButtonLink>}
        >
          It may be mistyped, or the record belongs to another shop. The field above finds a case by any part of its
          number, name, plate, VIN or code.
        </EmptyState>
      </main>
    </>
  );
}
