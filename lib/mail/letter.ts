/** A message before it is rendered: plain values, in the order they are read. */
export interface Letter {
  to: string;
  subject: string;
  /** Whose paper it is: the shop, or Firedeck itself. */
  sender: string;
  /** How to reach the sender, one line each. */
  senderLines?: string[];
  heading: string;
  blocks: Block[];
  lang?: string;
}

export type Block =
  | { kind: "text"; text: string }
  /** Somebody's own words. */
  | { kind: "words"; text: string; by?: string }
  | { kind: "button"; label: string; url: string }
  | { kind: "facts"; rows: readonly (readonly [label: string, value: string])[] }
  | { kind: "sums"; rows: readonly { label: string; amount: string; isTotal?: boolean; note?: string }[] }
  /** Danger to people: inverse, the only alarm there is. */
  | { kind: "alarm"; text: string }
  | { kind: "note"; text: string };

export interface RenderedMail {
  to: string;
  subject: string;
  text: string;
  html: string;
}

const ENTITIES: Record<string, string> = { "&": "&amp;", "<": "&lt;", ">": "&gt;", '"': "&quot;", "'": "&#39;" };
export const escapeHtml = (text: string): string => text.replace(/[&<>"']/g, (sign) => ENTITIES[sign]!);

/** Only web addresses become links: a `javascript:` address in a name or a setting must not. */
function safeUrl(url: string): string {
  if (!/^https?:\/\//i.test(url)) throw new RangeError(`not a web address: ${url.slice(0, 40)}`);
  return escapeHtml(url);
}

// mail programs read neither stylesheets nor variables, so every element carries its own values
const INK = "#14191c";
const SECOND = "#3e4a51";
const LABEL = "#57646b";
const RULE = "#d2dbdf";
const FONT = "font-family:Archivo,'Helvetica Neue',Arial,sans-serif";
const MONO = "font-family:'Martian Mono',ui-monospace,Menlo,Consolas,monospace;font-size:14px";

const paragraphs = (text: string) => escapeHtml(text.trim()).replace(/\n/g, "<br>");

function blockHtml(block: Block): string {
  switch (block.kind) {
    case "text":
      return `<p style="margin:0 0 16px">${paragraphs(block.text)}</p>`;
    case "words": {
      const by = block.by ? `<br><span style="color:${LABEL};font-size:13px">${escapeHtml(block.by)}</span>` : "";
      return `<p style="margin:0 0 16px;padding-left:16px;border-left:4px solid ${INK}">“${paragraphs(block.text)}”${by}</p>`;
    }
    case "button": {
      const url = safeUrl(block.url);
      return `<p style="margin:24px 0"><a href="${url}" style="display:inline-block;padding:14px 24px;background:#0b5963;color:#ffffff;text-decoration:none;font-weight:600;border-radius:3px">${escapeHtml(block.label)}</a></p><p style="margin:0 0 16px;color:${LABEL};font-size:13px;line-height:18px">If the button does not work, open this address:<br><a href="${url}" style="color:#0b5963;word-break:break-all">${url}</a></p>`;
    }
    case "facts": {
      const rows = block.rows.map(
        ([label, value]) =>
          `<tr><td style="padding:4px 24px 4px 0;color:${LABEL};font-size:13px;vertical-align:top;white-space:nowrap">${escapeHtml(label)}</td><td style="padding:4px 0">${paragraphs(value)}</td></tr>`,
      );
      return `<table role="presentation" style="border-collapse:collapse;margin:0 0 16px;font-size:15px;line-height:22px">${rows.join("")}</table>`;
    }
    case "sums": {
      const rows = block.rows.map(({ label, amount, isTotal, note }) => {
        const line = isTotal
          ? `border-top:1px solid ${INK};font-weight:700;font-size:17px`
          : `border-top:1px solid ${RULE}`;
        const under = note ? `<br><span style="color:${LABEL};font-size:13px">${escapeHtml(note)}</span>` : "";
        return `<tr><td style="padding:8px 16px 8px 0;${line}">${escapeHtml(label)}${under}</td><td style="padding:8px 0;text-align:right;white-space:nowrap;vertical-align:top;${line};${MONO}">${escapeHtml(amount)}</td></tr>`;
      });
      return `<table style="width:100%;border-collapse:collapse;margin:8px 0 24px">${rows.join("")}</table>`;
    }
    case "alarm":
      return `<p style="margin:0 0 16px;padding:12px 16px;background:${INK};color:#ffffff;font-weight:600">${paragraphs(block.text)}</p>`;
    case "note":
      return `<p style="margin:0 0 12px;color:${LABEL};font-size:13px;line-height:18px">${paragraphs(block.text)}</p>`;
  }
}

function blockText(block: Block): string {
  switch (block.kind) {
    case "text":
    case "note":
      return block.text.trim();
    case "words":
      return `“${block.text.trim()}”${block.by ? `\n${block.by}` : ""}`;
    case "button":
      return `${block.label}:\n${block.url}`;
    case "facts":
      return block.rows.map(([label, value]) => `${label}: ${value}`).join("\n");
    case "sums":
      return block.rows.map(({ label, amount, note }) => `${label}: ${amount}${note ? ` (${note})` : ""}`).join("\n");
    case "alarm":
      return `! ${block.text.trim()}`;
  }
}

/** Renders a letter as HTML with inline styles, and as plain text that says the same. Everything is escaped. */
export function renderLetter(letter: Letter): RenderedMail {
  const { to, subject, sender, senderLines = [], heading, blocks, lang = "en" } = letter;
  const foot = [sender, ...senderLines].filter(Boolean);
  const html = `<!doctype html>
<html lang="${escapeHtml(lang)}"><head><meta charset="utf-8"><meta name="viewport" content="width=device-width,initial-scale=1"><title>${escapeHtml(subject)}</title></head>
<body style="margin:0;background:#f4f7f8;color:${INK};${FONT};font-size:16px;line-height:24px"><div style="max-width:560px;margin:0 auto;padding:32px 24px">
<p style="margin:0 0 20px;padding-bottom:12px;border-bottom:2px solid ${INK};font-weight:650">${escapeHtml(sender)}</p>
<h1 style="margin:0 0 16px;font-size:24px;line-height:30px;font-weight:620">${escapeHtml(heading)}</h1>
${blocks.map(blockHtml).join("\n")}
<p style="margin:32px 0 0;padding-top:12px;border-top:1px solid #a9b5bb;color:${SECOND};font-size:13px;line-height:18px">${foot.map(escapeHtml).join("<br>")}</p>
</div></body></html>`;
  const text = `${[heading, ...blocks.map(blockText)].join("\n\n")}\n\n-- \n${foot.join("\n")}\n`;
  return { to, subject: subject.replace(/\s+/g, " ").trim(), text, html };
}
