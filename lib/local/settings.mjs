import { join } from "node:path";
import { freePort } from "./ports.mjs";

/** Ports tried first; the next free one is taken when somebody has them. */
const FIRST = { web: 3000, smtp: 4025, mailbox: 4026, files: 4027 };
const FIRST_IN_TESTS = { web: 3400, smtp: 4425, mailbox: 4426, files: 4427 };

/** What tests must never take from the environment they run in: they would reach a real database, or send real mail. */
const REPLACED =
  /^(DATABASE_URL|APP_DATABASE_URL|AUTH_DATABASE_URL|APP_URL|BETTER_AUTH_SECRET|SMTP_URL|MAIL.*|UPLOADTHING_.*|STAND_INS|LOCAL_DIR|DEMO_FILE|PORT|LISTEN_HOST)$/;

/**
 * The environment of everything that is started. What is set already stays; a loopback stand-in serves what is not.
 *
 * @param {object} options
 * @param {string} options.folder what the stand-ins store goes here
 * @param {Awaited<ReturnType<typeof import("./secrets.mjs").secretsIn>>} options.secrets
 * @param {{ url: string } | undefined} options.cluster the private cluster, absent when DATABASE_URL is set
 * @param {boolean} [options.dev]
 * @param {boolean} [options.test] own ports, and always the stand-ins
 * @returns {Promise<{ env: NodeJS.ProcessEnv, webPort: number, standIns: string[] }>}
 */
export async function settings({ folder, secrets, cluster, dev = false, test = false }) {
  const given = { ...process.env };
  if (test) for (const name of Object.keys(given)) if (REPLACED.test(name)) delete given[name];
  const first = test ? FIRST_IN_TESTS : FIRST;
  const webPort = await freePort(Number(given.PORT) || first.web);
  const standIns = [];
  const made = {
    NODE_ENV: dev ? "development" : "production",
    NEXT_TELEMETRY_DISABLED: "1",
    APP_URL: `http://localhost:${webPort}`,
    BETTER_AUTH_SECRET: secrets.authSecret,
    MAIL_FROM: "Firedeck <desk@firedeck.example>",
    LOCAL_DIR: folder,
    DEMO_FILE: join(folder, "demo.json"),
    UPLOADTHING_LOG_LEVEL: "Warning",
  };
  if (cluster) {
    const as = (role, password) => Object.assign(new URL(cluster.url), { username: role, password }).toString();
    made.DATABASE_URL = cluster.url;
    made.APP_DATABASE_URL = as("firedeck_app", secrets.appPassword);
    made.AUTH_DATABASE_URL = as("firedeck_auth", secrets.authPassword);
  }
  if (!given.SMTP_URL) {
    standIns.push("mail");
    const [smtp, mailbox] = [await freePort(first.smtp), await freePort(first.mailbox)];
    Object.assign(made, {
      SMTP_URL: `smtp://127.0.0.1:${smtp}`,
      MAILBOX_URL: `http://localhost:${mailbox}`,
      MAIL_SINK_DOWN_FILE: join(folder, "mail-is-down"),
    });
  }
  if (!given.UPLOADTHING_TOKEN) {
    standIns.push("files");
    const files = await freePort(first.files);
    const token = { apiKey: secrets.filesKey, appId: "firedeck-local", regions: ["local"] };
    Object.assign(made, {
      UPLOADTHING_TOKEN: Buffer.from(JSON.stringify(token)).toString("base64"),
      UPLOADTHING_INGEST_URL: `http://localhost:${files}`,
      UPLOADTHING_API_URL: `http://localhost:${files}`,
      // its name must hold "local", or the library signs https addresses
      UPLOADTHING_UFS_HOST: `localhost:${files}`,
      UPLOADTHING_UFS_APP_ID_LOCATION: "path",
    });
  }
  made.STAND_INS = standIns.join(",");

  const env = { ...given };
  for (const [name, value] of Object.entries(made)) if (!env[name] || name === "NODE_ENV") env[name] = value;
  return { env, webPort, standIns };
}
