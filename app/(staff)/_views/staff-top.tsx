import { cookies } from "next/headers";
import { SignOutButton } from "@/components/people/sign-out";
import { TopBar } from "@/components/ui/top-bar";
import type { Ctx } from "@/lib/auth/context";
import { mayDo } from "@/lib/auth/permissions";
import { ROLE_WORDS } from "@/lib/auth/role-words";
import { LiveSaveState } from "../_client/live-save-state";

export type NavPart = "cases" | "customers" | "vehicles" | "prices" | "reports" | "audit" | "settings";

export interface StaffTopProps {
  ctx: Ctx;
  shop: string;
  current: NavPart;
  findText?: string;
}

/** The words of the main parts; the owner has three more. */
export function navFor(ctx: Ctx, current: NavPart) {
  const parts: [NavPart, string, boolean][] = [
    ["cases", "Cases", true],
    ["customers", "Customers", true],
    ["vehicles", "Vehicles", true],
    ["prices", "Prices", true],
    ["reports", "Reports", mayDo(ctx.actor.role, "report.read")],
    ["audit", "Audit", mayDo(ctx.actor.role, "audit.read")],
    ["settings", "Settings", mayDo(ctx.actor.role, "settings.edit")],
  ];
  return parts
    .filter(([, , isShown]) => isShown)
    .map(([part, label]) => ({ href: `/${part}`, label, current: part === current }));
}

export async function StaffTop({ ctx, shop, current, findText }: StaffTopProps) {
  const density = (await cookies()).get("fd-density")?.value === "bay" ? "bay" : "counter";
  return (
    <TopBar
      shop={shop}
      nav={navFor(ctx, current)}
      person={{ name: ctx.actor.name, role: ROLE_WORDS[ctx.actor.role] ?? ctx.actor.role }}
      findText={findText}
      save={<LiveSaveState />}
      density={density}
      menu={<SignOutButton look="link" />}
    />
  );
}
