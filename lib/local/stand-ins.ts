import { join } from "node:path";
import { fileServer } from "./file-server";
import { mailSink } from "./mail-sink";
import { mailboxServer } from "./mailbox";

/**
 * The loopback servers that stand in for hosted services: mail and files. Which ones, where and with which keys comes
 * from the environment that the start and test commands make; what they keep lies under LOCAL_DIR.
 */
function need(name: string): string {
  const value = process.env[name];
  if (!value) throw new Error(`${name} is not set: the stand-ins are started by \`npm start\` and \`npm test\`.`);
  return value;
}

const portOf = (url: string) => Number(new URL(url).port);

async function main(): Promise<void> {
  const folder = need("LOCAL_DIR");
  const wanted = (process.env.STAND_INS ?? "").split(",");
  const closers: (() => Promise<void>)[] = [];
  if (wanted.includes("mail")) {
    const mailFolder = join(folder, "mail");
    closers.push(
      await mailSink({ folder: mailFolder, port: portOf(need("SMTP_URL")), downFile: process.env.MAIL_SINK_DOWN_FILE }),
    );
    closers.push(await mailboxServer({ folder: mailFolder, port: portOf(need("MAILBOX_URL")) }));
  }
  if (wanted.includes("files")) {
    const { apiKey, appId } = JSON.parse(Buffer.from(need("UPLOADTHING_TOKEN"), "base64").toString("utf8"));
    closers.push(
      await fileServer({
        folder: join(folder, "files"),
        url: need("UPLOADTHING_INGEST_URL"),
        appUrl: need("APP_URL"),
        apiKey,
        appId,
      }),
    );
  }
  const stop = () => void Promise.all(closers.map((close) => close())).then(() => process.exit(0));
  process.on("SIGTERM", stop);
  process.on("SIGINT", stop);
}

main().catch((error: unknown) => {
  console.error(error);
  process.exit(1);
});
