import { AppError } from "@/lib/errors";
import { type Action, mayDo, type Role } from "./permissions";

declare const shopIdBrand: unique symbol;
/** Made only by the session gate, the link gate, the worker and the seed; never read from a request's body. */
export type ShopId = string & { readonly [shopIdBrand]: true };

export interface Actor {
  id: string;
  name: string;
  role: Role;
}

export interface Ctx {
  shopId: ShopId;
  actor: Actor;
  requestId: string;
  now: Date;
  /** Set when a customer acts: the link and the paper it opens. */
  link?: { id: string; kind: "quote" | "invoice"; caseId: string; targetId: string };
  address?: string;
  userAgent?: string;
}

export const asShopId = (id: string) => id as ShopId;

/** Throws `forbidden` with a sentence that says who may. */
export function authorize(ctx: Pick<Ctx, "actor">, action: Action): void {
  if (mayDo(ctx.actor.role, action)) return;
  throw new AppError("forbidden", whoMay(action));
}

function whoMay(action: Action): string {
  const roles = (["owner", "writer", "technician"] as const).filter((role) => mayDo(role, action));
  const words = { owner: "the owner", writer: "a service writer", technician: "a technician" };
  if (roles.length === 0) return "This is not for staff to do.";
  return `Only ${roles.map((role) => words[role]).join(" or ")} may do this.`;
}
