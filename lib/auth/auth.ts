import "server-only";
import { betterAuth } from "better-auth";
import { drizzleAdapter } from "better-auth/adapters/drizzle";
import { APIError } from "better-auth/api";
import { nextCookies } from "better-auth/next-js";
import { organization } from "better-auth/plugins";
import { createAccessControl } from "better-auth/plugins/access";
import { authDb } from "@/db/client";
import * as tables from "@/db/schema/auth";
import { env } from "@/lib/env";
import { sendMail } from "@/lib/mail/mailer";
import { invitationMail, passwordResetMail } from "@/lib/mail/templates";
import { isStaffRole } from "./permissions";

// what a role may do in the shop's work stands in permissions.ts; this is only the membership plugin's own part
const statements = {
  organization: ["update", "delete"],
  member: ["create", "update", "delete"],
  invitation: ["create", "cancel"],
  ac: ["read"],
} as const;
const access = createAccessControl(statements);
const owner = access.newRole({
  organization: ["update"],
  member: ["create", "update", "delete"],
  invitation: ["create", "cancel"],
  ac: ["read"],
});
const plain = () => access.newRole({ ac: ["read"] });

function requireStaffRole(role: string | string[] | null | undefined): void {
  const roles = Array.isArray(role) ? role : (role ?? "").split(",");
  if (roles.length === 1 && isStaffRole(roles[0] ?? "")) return;
  throw new APIError("BAD_REQUEST", { message: "A person is an owner, a writer or a technician." });
}

const SIX_DAYS = 60 * 60 * 24 * 6;

function build() {
  const { APP_URL, BETTER_AUTH_SECRET, CLIENT_ADDRESS_HEADER } = env();
  return betterAuth({
    baseURL: APP_URL,
    secret: BETTER_AUTH_SECRET,
    trustedOrigins: [APP_URL, APP_URL.replace("//localhost", "//127.0.0.1")],
    database: drizzleAdapter(authDb(), { provider: "pg", schema: { ...tables, rateLimit: tables.rateLimit } }),
    telemetry: { enabled: false },
    emailAndPassword: {
      enabled: true,
      minPasswordLength: 10,
      maxPasswordLength: 128,
      autoSignIn: true,
      revokeSessionsOnPasswordReset: true,
      async sendResetPassword({ user, url }) {
        await sendMail(passwordResetMail({ to: user.email, name: user.name, url }));
      },
    },
    session: { expiresIn: SIX_DAYS, updateAge: 60 * 60 * 12 },
    rateLimit: {
      enabled: true,
      storage: "database",
      window: 10,
      max: 100,
      customRules: { "/sign-in/email": { window: 10, max: 30 }, "/sign-up/email": { window: 60, max: 20 } },
    },
    advanced: {
      useSecureCookies: APP_URL.startsWith("https:"),
      defaultCookieAttributes: { sameSite: "lax", httpOnly: true },
      ipAddress: { ipAddressHeaders: CLIENT_ADDRESS_HEADER ? [CLIENT_ADDRESS_HEADER] : [] },
    },
    plugins: [
      organization({
        ac: access,
        roles: { owner, writer: plain(), technician: plain() },
        creatorRole: "owner",
        allowUserToCreateOrganization: false,
        invitationExpiresIn: 60 * 60 * 48,
        cancelPendingInvitationsOnReInvite: true,
        async sendInvitationEmail({ id, email, role, organization: shop, inviter }) {
          await sendMail(
            invitationMail({
              to: email,
              shopName: shop.name,
              inviterName: inviter.user.name,
              role: String(role),
              url: `${APP_URL}/invitation/${id}`,
            }),
          );
        },
        organizationHooks: {
          beforeCreateInvitation: async ({ invitation }) => requireStaffRole(invitation.role),
          beforeAddMember: async ({ member }) => requireStaffRole(member.role),
          beforeUpdateMemberRole: async ({ newRole }) => requireStaffRole(newRole),
        },
      }),
      nextCookies(),
    ],
  });
}

export type Auth = ReturnType<typeof build>;
let made: Auth | undefined;
/** Built on first use, so that a build of the pages needs no secrets. */
export const auth = (): Auth => {
  made ??= build();
  return made;
};
