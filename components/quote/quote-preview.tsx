"use client";

import { useState } from "react";
import { Tell, vehicleWords } from "@/components/approve/approve-page";
import { AnsweredSummary } from "@/components/approve/done-page";
import { JobAnswer } from "@/components/approve/job-answer";
import type { CustomerPhoto, RevisionSnapshot } from "@/components/approve/model";

export interface QuotePreviewProps {
  snapshot: RevisionSnapshot;
  photos: readonly CustomerPhoto[];
  customerName: string;
}

/** The customer's own components, live, on a phone or as the paper lists it. */
export function QuotePreview({ snapshot, photos, customerName }: QuotePreviewProps) {
  const [isPaper, setPaper] = useState(false);
  return (
    <>
      <header>
        <h2>As {customerName.split(" ")[0]} sees it</h2>
        <div className="pick">
          <button type="button" aria-pressed={!isPaper} onClick={() => setPaper(false)}>
            Phone
          </button>
          <button type="button" aria-pressed={isPaper} onClick={() => setPaper(true)}>
            Paper
          </button>
        </div>
      </header>
      {/* biome-ignore lint/a11y/noNoninteractiveTabindex: it scrolls, so it must be reachable by keyboard */}
      <section className="frame daylight" tabIndex={0} aria-label="Customer page, preview">
        {isPaper ? (
          <>
            <p className="for">
              {snapshot.paperWord === "estimate" ? "Estimate" : "Quotation"} {snapshot.caseNumber}, revision{" "}
              {snapshot.number}. {vehicleWords(snapshot)}
            </p>
            <h3 className="hl">{snapshot.headline}</h3>
            <p className="soft">{snapshot.finding}</p>
            <AnsweredSummary
              snapshot={snapshot}
              yesJobIds={snapshot.jobs.map((job) => job.id)}
              totalMinor={snapshot.totals.startsAtMinor + snapshot.jobs.reduce((sum, job) => sum + job.totalMinor, 0)}
            />
          </>
        ) : (
          <>
            <p className="for">{vehicleWords(snapshot)}</p>
            <Tell snapshot={snapshot} photos={photos} isPreview />
            <ol>
              {snapshot.jobs.map((job) => (
                <JobAnswer key={job.id} job={job} snapshot={snapshot} isPreview />
              ))}
            </ol>
          </>
        )}
      </section>
    </>
  );
}
