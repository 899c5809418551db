import { ButtonLink } from "@/components/ui/button";
import { NotAllowed } from "@/components/ui/states";
import type { Ctx } from "@/lib/auth/context";
import { readShop } from "@/lib/services/shops/read";
import { type NavPart, StaffTop } from "./staff-top";

/** A page of the owner's, as everyone else finds it: what it is, who may see it, and how to ask. */
export async function OwnersOnly({
  ctx,
  current,
  title,
  what,
}: {
  ctx: Ctx;
  current: NavPart;
  title: string;
  what: string;
}) {
  const { shop, staff } = await readShop(ctx);
  const owners = staff.filter((person) => person.role === "owner");
  const names = owners.map((person) => person.name).join(" or ");
  const [first] = owners;
  return (
    <>
      <StaffTop ctx={ctx} shop={shop.name} current={current} />
      <main id="main" className="page">
        <h1 className="vh">{title}</h1>
        <NotAllowed
          title={title}
          acts={
            <>
              <ButtonLink href="/cases">Back to the cases</ButtonLink>
              {first && (
                <a className="btn quiet" href={`mailto:${first.email}`}>
                  Ask {first.name.split(" ")[0]}
                </a>
              )}
            </>
          }
        >
          {what} {names ? `${names} can show it to you, or change your role.` : "An owner can show it to you."}
        </NotAllowed>
      </main>
    </>
  );
}
