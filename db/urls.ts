import { createHmac } from "node:crypto";

export interface DatabaseUrls {
  /** Owns the tables and the queue; used by migrations and the queue only. */
  owner: string;
  /** Bound by the row policies; every business read and write. */
  app: string;
  /** Reaches the sign-in tables only. */
  auth: string;
}

/**
 * The three connections. With only `DATABASE_URL` and the secret set, the two lesser roles take the same server and
 * a password made from the secret, so that a deployment has one URL to look after.
 */
export function databaseUrls(env: Record<string, string | undefined> = process.env): DatabaseUrls {
  const owner = env.DATABASE_URL;
  if (!owner)
    throw new Error("DATABASE_URL is not set: give the PostgreSQL address, or run `npm start`, which brings its own.");
  const secret = env.BETTER_AUTH_SECRET ?? "";
  const as = (role: string) => {
    const url = new URL(owner);
    url.username = role;
    url.password = createHmac("sha256", secret).update(role).digest("hex").slice(0, 40);
    return url.toString();
  };
  return { owner, app: env.APP_DATABASE_URL ?? as("firedeck_app"), auth: env.AUTH_DATABASE_URL ?? as("firedeck_auth") };
}
