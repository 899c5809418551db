import type { Metadata } from "next";
import { InvoicePage } from "@/components/approve/invoice-page";
import { LinkOver } from "@/components/approve/link-over";
import { formatWhen } from "@/components/ui/format";
import { requestFacts } from "@/lib/auth/session";
import { PAYMENT_LABELS } from "@/lib/cases/work-schema";
import { readCustomerInvoice } from "@/lib/services/quotes/customer-read";
import { openLink } from "@/lib/services/quotes/links";

export const metadata: Metadata = { title: "Your invoice", robots: { index: false } };

export default async function Page({ params }: { params: Promise<{ secret: string }> }) {
  const { secret } = await params;
  const opened = await openLink(secret, await requestFacts());
  if (opened?.ctx.link?.kind !== "invoice") return <LinkOver why="unknown" shop={null} />;
  if (opened.state !== "open") {
    const shop = { ...opened.shop, address: "", registration: "" };
    return <LinkOver why={opened.state === "revoked" ? "withdrawn" : "expired"} shop={shop} />;
  }
  const { snapshot, paidMinor, payments } = await readCustomerInvoice(opened.ctx);
  const when = (iso: string) => formatWhen(iso, opened.ctx.now.toISOString(), snapshot.timeZone);
  return (
    <InvoicePage
      invoice={snapshot}
      pdfHref={`/i/${secret}/paper`}
      paidMinor={paidMinor}
      payments={payments.map(({ how, at, amountMinor }) => ({
        words: `${(PAYMENT_LABELS[how as keyof typeof PAYMENT_LABELS] ?? how).toLowerCase()}, ${when(at)}`,
        amountMinor,
      }))}
    />
  );
}
