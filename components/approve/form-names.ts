/** Names of the fields of the customer's form, and how a posted form is read back. Plain, so that it works without scripts. */
export const answerName = (jobId: string) => `answer.${jobId}`;
export const reasonName = (jobId: string) => `reason.${jobId}`;
export const riskName = (jobId: string) => `risk.${jobId}`;

export interface PostedAnswers {
  answers: { jobId: string; answer: "yes" | "not-now"; reason?: string }[];
  givenBy: string;
  keepParts: boolean;
  mayDecide: boolean;
  takesPapersByMail: boolean;
}

/** Reads a posted form. A job without an answer is left out; the service names it. */
export function readAnswers(form: FormData, jobIds: readonly string[]): PostedAnswers {
  const text = (name: string) => String(form.get(name) ?? "").trim();
  return {
    answers: jobIds.flatMap((jobId) => {
      const answer = text(answerName(jobId));
      if (answer !== "yes" && answer !== "not-now") return [];
      const hasReadRisk = answer === "not-now" && form.get(riskName(jobId)) !== null;
      const reason = [hasReadRisk ? "Has read the risk." : "", answer === "not-now" ? text(reasonName(jobId)) : ""]
        .filter(Boolean)
        .join(" ");
      return [{ jobId, answer, ...(reason ? { reason: reason.slice(0, 300) } : {}) }];
    }),
    givenBy: text("givenBy"),
    keepParts: form.get("keepParts") !== null,
    mayDecide: form.get("mayDecide") !== null,
    takesPapersByMail: form.get("byMail") !== null,
  };
}
