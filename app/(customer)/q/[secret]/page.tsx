import type { Metadata } from "next";
import { cookies } from "next/headers";
import { ApprovePage } from "@/components/approve/approve-page";
import { DonePage } from "@/components/approve/done-page";
import { LinkOver } from "@/components/approve/link-over";
import { formatWhen } from "@/components/ui/format";
import { requestFacts } from "@/lib/auth/session";
import { readCustomerQuote } from "@/lib/services/quotes/customer-read";
import { openLink } from "@/lib/services/quotes/links";
import { FAULT_COOKIE, readFaults } from "../../_views/faults";
import { doneView } from "../../_views/progress";

export const metadata: Metadata = { title: "Your vehicle", robots: { index: false } };

export default async function QuotePage({ params }: { params: Promise<{ secret: string }> }) {
  const { secret } = await params;
  const opened = await openLink(secret, await requestFacts());
  if (opened?.ctx.link?.kind !== "quote") return <LinkOver why="unknown" shop={null} />;
  const { ctx } = opened;
  const quote = await readCustomerQuote(ctx);
  const { snapshot, standing } = quote;
  const done = doneView(quote, ctx.now, [{ label: "Get the paper, PDF", href: `/q/${secret}/paper` }]);
  if (done) return <DonePage done={done} />;
  if (standing !== "open" || opened.state !== "open") {
    return (
      <LinkOver
        why={standing === "open" ? (opened.state === "revoked" ? "withdrawn" : "expired") : standing}
        shop={snapshot.shop}
      />
    );
  }
  const faults = readFaults((await cookies()).get(FAULT_COOKIE)?.value);
  return (
    <ApprovePage
      snapshot={snapshot}
      photos={quote.photos.map((photo) => ({
        id: photo.id,
        src: `/q/${secret}/photo/${photo.id}`,
        alt: photo.caption ?? "Photo from the workshop",
        caption: photo.caption ?? undefined,
      }))}
      questions={quote.questions.map((each) => ({
        id: each.id,
        from: each.fromCustomer ? "customer" : "shop",
        name: each.name,
        text: each.text,
        when: formatWhen(each.at, ctx.now.toISOString(), snapshot.timeZone),
      }))}
      answerAction={`/q/${secret}/answer`}
      questionAction={`/q/${secret}/ask`}
      given={faults.given}
      errors={faults.errors}
      keepKey={quote.revisionId}
    />
  );
}
