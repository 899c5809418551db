import { CustomerFrame } from "./approve-page";

export interface LinkOverProps {
  why: "expired" | "withdrawn" | "superseded" | "unknown";
  shop: { name: string; address: string; phone: string; email: string; registration: string } | null;
}

const WORDS: Record<LinkOverProps["why"], { title: string; text: string }> = {
  expired: {
    title: "This link has run out",
    text: "Prices are kept for some days only. Call the shop for a new one; nothing is done until you say yes.",
  },
  withdrawn: {
    title: "The shop has taken this back",
    text: "It no longer stands, and nothing is done on it. Call the shop to hear what comes instead.",
  },
  superseded: {
    title: "There is a newer one",
    text: "The shop has sent you a newer message with what it found since. Please open that one.",
  },
  unknown: {
    title: "This link leads nowhere",
    text: "It may be cut short. Open it again from the message, or call your shop.",
  },
};

/** An expired or withdrawn link says who to call, and shows nothing else. */
export function LinkOver({ why, shop }: LinkOverProps) {
  const { title, text } = WORDS[why];
  const body = (
    <main className="custmain over" id="main">
      <div className="tell">
        <h1>{title}</h1>
        <p className="lede">{text}</p>
        {shop?.phone && (
          <p>
            <a className="btn" href={`tel:${shop.phone.replace(/[^+\d]/g, "")}`}>
              Call {shop.name}, {shop.phone}
            </a>
          </p>
        )}
      </div>
    </main>
  );
  return shop ? (
    <CustomerFrame snapshot={{ shop }}>{body}</CustomerFrame>
  ) : (
    <div className="custpage day-only">{body}</div>
  );
}
