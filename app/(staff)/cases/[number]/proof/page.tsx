import type { Metadata } from "next";
import Link from "next/link";
import { formatPrice } from "@/components/ui/format";
import { moneyEntry } from "@/components/ui/parse-entry";
import { mayDo } from "@/lib/auth/permissions";
import { TESTS } from "@/lib/diagnosis/tests";
import { invoiceSnapshot } from "@/lib/services/papers/snapshot";
import { ActDialog } from "../../../_client/act-dialog";
import { ProofClient } from "../_client/proof-client";
import { ReadinessDialog } from "../_client/readiness-dialog";
import { RepeatTest } from "../_client/repeat-test";
import { CaseShell } from "../_views/case-shell";
import { loadCase, type PartParams } from "../_views/load";
import { MONITORS, proofView } from "../_views/proof-view";

export const metadata: Metadata = { title: "Proof" };

export default async function ProofPage({ params }: PartParams) {
  const { ctx, view } = await loadCase((await params).number);
  const { row, workJobs, tests } = view.parts;
  const { settings, gate } = view;
  const { role } = ctx.actor;
  const isOpen = row.stage === "proof";
  const demands = gate?.next === "closed" ? gate.demands : [];
  const corrections = workJobs.filter((job) => job.state === "done").map((job) => job.correction ?? job.title);
  const invoice = invoiceSnapshot(view.parts, { number: "", correction: "", odometerOutKm: null, now: ctx.now });
  const total = formatPrice(invoice.totals.totalMinor, settings.currency, settings.locale);
  const repeatable = [...new Set(tests.filter((test) => test.phase === "before").map((test) => test.testId))].flatMap(
    (id) => {
      const test = TESTS[id as keyof typeof TESTS];
      return test
        ? [
            {
              id,
              title: test.title,
              outcomes: test.outcomes.map((outcome) => ({ value: outcome.id, label: outcome.label })),
            },
          ]
        : [];
    },
  );
  return (
    <CaseShell ctx={ctx} view={view} part="proof">
      <ProofClient
        caseId={row.id}
        {...proofView(view)}
        acts={
          isOpen && (
            <>
              <ReadinessDialog
                caseId={row.id}
                monitors={MONITORS}
                readiness={row.readiness}
                codesRead={row.afterCodesRead}
              />
              {repeatable.length > 0 && <RepeatTest caseId={row.id} tests={repeatable} />}
              <Link className="btn" href={`/cases/${row.number}/readings`}>
                Take the after readings
              </Link>
            </>
          )
        }
        gate={demands.map((demand) => ({ label: demand.text, isMet: demand.met }))}
        gateActs={
          isOpen && (
            <>
              {mayDo(role, "invoice.issue") && (
                <ActDialog
                  label="Close and invoice"
                  look={gate?.open ? "act" : "quiet"}
                  disabled={!gate?.open}
                  verb="case.close"
                  input={{ caseId: row.id }}
                  intro={`The invoice is ${total}, tax included: the diagnosis and the agreed jobs that were done, each at its agreed price. It is mailed, and the case is frozen.`}
                  fields={[
                    { kind: "area", name: "correction", label: "What was done", value: corrections.join("\n") },
                    {
                      kind: "odometer",
                      name: "odometerOutKm",
                      label: "Odometer out",
                      units: settings.units,
                      optional: true,
                    },
                  ]}
                  sendLabel={`Issue the invoice of ${moneyEntry(invoice.totals.totalMinor, settings.currency)} ${settings.currency}`}
                  busyLabel="Issuing"
                  goTo={`/cases/${row.number}/papers`}
                />
              )}
              {mayDo(role, "case.advance") && (
                <ActDialog
                  label="Back to testing"
                  look="link"
                  verb="case.back"
                  input={{ caseId: row.id, to: "testing" }}
                  fields={[{ kind: "text", name: "reason", label: "Why" }]}
                  sendLabel="Send it back to testing"
                  goTo={`/cases/${row.number}/causes`}
                />
              )}
            </>
          )
        }
        mayWaive={isOpen && mayDo(role, "case.waiveProof")}
      />
    </CaseShell>
  );
}
