"use client";

import { createContext, type ReactNode, useContext, useEffect, useRef, useState, useSyncExternalStore } from "react";
import { formatPrice } from "@/components/ui/format";
import { answerName } from "./form-names";
import type { RevisionSnapshot } from "./model";

interface Live {
  answers: Record<string, "yes" | "not-now">;
  totalMinor: number;
  openCount: number;
}

const LiveContext = createContext<Live | null>(null);

export interface AnswerLiveProps {
  snapshot: RevisionSnapshot;
  formId: string;
  /** Answers are kept on this phone under this key until they are sent. */
  keepKey: string;
  children: ReactNode;
}

/**
 * What the page gains with scripts: a running total, jobs that follow the one they need, answers that survive a reload
 * or a dead network. Without it the same form is posted as it is.
 */
export function AnswerLive({ snapshot, formId, keepKey, children }: AnswerLiveProps) {
  const [answers, setAnswers] = useState<Live["answers"] | null>(null);

  useEffect(() => {
    const form = document.getElementById(formId);
    if (!(form instanceof HTMLFormElement)) return;
    const field = (jobId: string, answer: string) =>
      form.querySelector<HTMLInputElement>(`input[name="${CSS.escape(answerName(jobId))}"][value="${answer}"]`);
    const read = () => {
      const now: Live["answers"] = {};
      for (const job of snapshot.jobs) {
        if (field(job.id, "yes")?.checked) now[job.id] = "yes";
        else if (field(job.id, "not-now")?.checked) now[job.id] = "not-now";
      }
      // A job that needs another can't be yes where that one is not now.
      for (const job of snapshot.jobs) {
        const needs =
          job.dependsOnId && snapshot.jobs.some((other) => other.id === job.dependsOnId) ? job.dependsOnId : null;
        const yes = field(job.id, "yes");
        if (!yes) continue;
        yes.disabled = Boolean(needs && now[needs] === "not-now");
        if (yes.disabled && now[job.id] === "yes") {
          const no = field(job.id, "not-now");
          if (no) no.checked = true;
          now[job.id] = "not-now";
        }
      }
      setAnswers(now);
      try {
        sessionStorage.setItem(keepKey, JSON.stringify(now));
      } catch {
        // Not kept; the page still works.
      }
    };
    try {
      const kept = JSON.parse(sessionStorage.getItem(keepKey) ?? "{}") as Live["answers"];
      const isUntouched = !form.querySelector('input[type="radio"]:checked');
      if (isUntouched)
        for (const [jobId, answer] of Object.entries(kept)) {
          const input = field(jobId, answer);
          if (input) input.checked = true;
        }
    } catch {
      // Nothing usable was kept.
    }
    read();
    form.addEventListener("change", read);
    return () => form.removeEventListener("change", read);
  }, [snapshot, formId, keepKey]);

  const live: Live | null = answers && {
    answers,
    totalMinor:
      snapshot.totals.startsAtMinor +
      snapshot.jobs.reduce((sum, job) => (answers[job.id] === "yes" ? sum + job.totalMinor : sum), 0),
    openCount: snapshot.jobs.filter((job) => !answers[job.id]).length,
  };
  return <LiveContext value={live}>{children}</LiveContext>;
}

/** The summary: what was agreed before, each job with its price or "not now", the total. */
export function AnswerSummary({ snapshot }: { snapshot: RevisionSnapshot }) {
  const live = useContext(LiveContext);
  const price = (minor: number) => formatPrice(minor, snapshot.currency, snapshot.locale);
  return (
    <dl className="sum">
      {snapshot.diagnosis && (
        <div>
          <dt>Finding the fault, agreed before</dt>
          <dd>{price(snapshot.diagnosis.totalMinor)}</dd>
        </div>
      )}
      {snapshot.agreed.map((job) => (
        <div key={job.title}>
          <dt>{job.title}, agreed before</dt>
          <dd>{price(job.totalMinor)}</dd>
        </div>
      ))}
      {snapshot.jobs.map((job) => {
        const answer = live?.answers[job.id];
        return (
          <div key={job.id} className={answer === "not-now" ? "no" : undefined}>
            <dt>{job.customerTitle || job.title}</dt>
            <dd>
              {live === null
                ? price(job.totalMinor)
                : answer === "yes"
                  ? price(job.totalMinor)
                  : answer === "not-now"
                    ? "not now"
                    : "not answered"}
            </dd>
          </div>
        );
      })}
      <div className="tot">
        <dt>{live === null ? "Total if you say yes to all, tax included" : "Total, tax included"}</dt>
        <dd>{price(live === null ? snapshot.totals.totalMinor : live.totalMinor)}</dd>
      </div>
    </dl>
  );
}

/** The button names the amount once it is known. */
export function AgreeButton({ snapshot }: { snapshot: RevisionSnapshot }) {
  const live = useContext(LiveContext);
  const [isSent, setSent] = useState(false);
  const yes = live ? Object.values(live.answers).filter((answer) => answer === "yes").length : 0;
  const words =
    live === null
      ? "Send my answers"
      : yes === 0 && live.openCount === 0
        ? "Send: nothing for now"
        : `Agree to ${formatPrice(live.totalMinor, snapshot.currency, snapshot.locale)}`;
  const ref = useRef<HTMLButtonElement>(null);
  useEffect(() => {
    const form = ref.current?.form;
    if (!form) return;
    // A second press does nothing; the page that answers replaces this one.
    const onSubmit = () => setSent(true);
    form.addEventListener("submit", onSubmit);
    return () => form.removeEventListener("submit", onSubmit);
  }, []);
  return (
    <button ref={ref} className="btn full" type="submit" aria-busy={isSent || undefined}>
      {isSent ? "Sending" : words}
    </button>
  );
}

/** The bar at the foot: the running total. It steps aside while the summary is on screen. */
export function AnswerBar({ snapshot, targetId }: { snapshot: RevisionSnapshot; targetId: string }) {
  const live = useContext(LiveContext);
  const [isAside, setAside] = useState(false);
  useEffect(() => {
    const target = document.getElementById(targetId);
    if (!target || typeof IntersectionObserver === "undefined") return;
    const observer = new IntersectionObserver(([entry]) => setAside(entry?.isIntersecting ?? false), {
      rootMargin: "0px 0px -200px",
    });
    observer.observe(target);
    return () => observer.disconnect();
  }, [targetId]);
  if (live === null) return null;
  return (
    <aside className="standbar" aria-label="Your answers so far" hidden={isAside}>
      <div role="status">
        <span>
          {live.openCount === 0
            ? "With your answers"
            : `${live.openCount} ${live.openCount === 1 ? "answer" : "answers"} to give`}
        </span>
        <b>{formatPrice(live.totalMinor, snapshot.currency, snapshot.locale)}</b>
      </div>
      <a className="btn" href={`#${targetId}`}>
        Check and agree
      </a>
    </aside>
  );
}

function subscribeOnline(onChange: () => void) {
  window.addEventListener("online", onChange);
  window.addEventListener("offline", onChange);
  return () => {
    window.removeEventListener("online", onChange);
    window.removeEventListener("offline", onChange);
  };
}

export function OfflineNotice() {
  const isOnline = useSyncExternalStore(
    subscribeOnline,
    () => navigator.onLine,
    () => true,
  );
  if (isOnline) return null;
  return (
    <div className="off" role="status">
      <b>No network.</b> Your answers are kept on this phone. Send them when it is back.
    </div>
  );
}
