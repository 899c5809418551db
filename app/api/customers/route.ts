import { customerChoice } from "@/app/(staff)/_views/words";
import { ok, route } from "@/lib/http/route";
import { findCustomers } from "@/lib/services/customers/read";
import { readShop } from "@/lib/services/shops/read";

/** Customers that fit `q`, with their vehicles, for the intake form. */
export const GET = route(async ({ ctx, url }) => {
  const query = (url.searchParams.get("q") ?? "").replaceAll("\u0000", "").trim().slice(0, 100);
  const { settings } = await readShop(ctx);
  const found = query ? await findCustomers(ctx, query) : [];
  return ok(found.map((each) => customerChoice(each, settings.timeZone)));
});
