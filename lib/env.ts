import { z } from "zod";

const url = z.url();

const schema = z.object({
  DATABASE_URL: z.string().startsWith("postgres", "must be a postgres:// address"),
  APP_DATABASE_URL: z.string().startsWith("postgres").optional(),
  AUTH_DATABASE_URL: z.string().startsWith("postgres").optional(),
  APP_URL: url,
  BETTER_AUTH_SECRET: z.string().min(32, "must have at least 32 characters"),
  SMTP_URL: z.string().regex(/^smtps?:\/\//, "must be an smtp:// address"),
  MAIL_FROM: z.string().min(3),
  MAILBOX_URL: z.string().optional(),
  STAND_INS: z.string().default(""),
  UPLOADTHING_TOKEN: z.string().optional(),
  /** A header that the proxy in front overwrites with the caller's address; without one, addresses are not told apart. */
  CLIENT_ADDRESS_HEADER: z.string().optional(),
});

export type Env = z.output<typeof schema>;

let parsed: Env | undefined;

/** The environment, checked once; throws one error that lists everything that is wrong. */
export function env(): Env {
  if (parsed) return parsed;
  const result = schema.safeParse(process.env);
  if (!result.success) {
    const faults = result.error.issues.map((issue) => `  ${issue.path.join(".")}: ${issue.message}`).join("\n");
    throw new Error(`The environment is not complete:\n${faults}`);
  }
  parsed = result.data;
  return parsed;
}

/** Names of the services that a loopback stand-in serves, for the footer. */
export function standIns(): string[] {
  return env().STAND_INS.split(",").filter(Boolean);
}
