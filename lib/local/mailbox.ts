import { readdir, readFile } from "node:fs/promises";
import type { ServerResponse } from "node:http";
import { join } from "node:path";
import { onLoopback, safely } from "./loopback";
import type { StoredMail } from "./mail-sink";
import { listPage, messagePage, missingPage } from "./mailbox-page";

const ID = /^[\w-]+$/;
const LIST_LIMIT = 200;

async function read(folder: string, id: string): Promise<StoredMail | undefined> {
  if (!ID.test(id)) return undefined;
  return readFile(join(folder, `${id}.json`), "utf8").then(
    (text) => JSON.parse(text) as StoredMail,
    () => undefined,
  );
}

/** Newest first; `to` keeps those sent to that address. */
async function list(folder: string, to: string | null): Promise<StoredMail[]> {
  const names = (await readdir(folder).catch(() => []))
    .filter((name) => name.endsWith(".json"))
    .sort()
    .reverse();
  const found: StoredMail[] = [];
  for (const name of names) {
    if (found.length >= LIST_LIMIT) break;
    const mail = await read(folder, name.slice(0, -".json".length));
    if (mail && (!to || mail.to.some((address) => address.toLowerCase() === to.toLowerCase()))) found.push(mail);
  }
  return found;
}

function answer(
  response: ServerResponse,
  status: number,
  type: string,
  body: string | Buffer,
  headers: Record<string, string> = {},
): void {
  response.writeHead(status, {
    "content-type": type,
    "cache-control": "no-store",
    "x-content-type-options": "nosniff",
    ...headers,
  });
  response.end(body);
}

/**
 * The page on which the kept messages are read: `/`, `/mail/ID`, its body and attachments below that, and
 * `/mailbox.json?to=address` for programs.
 *
 * @returns what closes it
 */
export function mailboxServer(options: { folder: string; port: number }): Promise<() => Promise<void>> {
  const { folder } = options;
  return onLoopback(
    options.port,
    safely(async (request, response) => {
      const url = new URL(request.url ?? "/", "http://localhost");
      const [, part, id = "", what, index] = url.pathname.split("/");
      const to = url.searchParams.get("to");
      const page = (status: number, body: string) =>
        answer(response, status, "text/html; charset=utf-8", body, {
          "content-security-policy":
            "default-src 'none'; style-src 'unsafe-inline'; frame-src 'self'; form-action 'self'",
        });
      if (url.pathname === "/health") return answer(response, 200, "text/plain", "ok");
      if (url.pathname === "/mailbox.json")
        return answer(response, 200, "application/json", JSON.stringify(await list(folder, to)));
      if (url.pathname === "/") return page(200, listPage(await list(folder, to), to));
      const mail = part === "mail" ? await read(folder, id) : undefined;
      if (!mail) return page(404, missingPage());
      if (what === undefined) return page(200, messagePage(mail));
      if (what === "body") {
        // the message's own markup: nothing in it may run or load; its links open in a tab of their own
        const body = mail.html || "<p>This message has no HTML part.</p>";
        return answer(response, 200, "text/html; charset=utf-8", `<base target="_blank">${body}`, {
          "content-security-policy":
            "default-src 'none'; style-src 'unsafe-inline'; img-src data:; sandbox allow-popups allow-popups-to-escape-sandbox",
        });
      }
      const attachment = what === "attachment" ? mail.attachments[Number(index)] : undefined;
      if (!attachment) return page(404, missingPage());
      answer(response, 200, attachment.contentType, Buffer.from(attachment.base64, "base64"), {
        "content-disposition": `attachment; filename*=UTF-8''${encodeURIComponent(attachment.filename)}`,
      });
    }),
  );
}
