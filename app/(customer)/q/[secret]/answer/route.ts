import { readAnswers } from "@/components/approve/form-names";
import { linkRoute } from "@/lib/http/link-route";
import { toAppError } from "@/lib/http/problem";
import { logFault } from "@/lib/http/route";
import { giveApproval } from "@/lib/services/quotes/approve";
import { readCustomerQuote } from "@/lib/services/quotes/customer-read";
import { perform } from "@/lib/services/verb";
import { clearFaults, faultCookie, seeOther } from "../../../_views/faults";

/** Takes the customer's answers as a plain form, with or without scripts, and goes back to the page. */
export const POST = linkRoute<{ secret: string }>(async ({ request, ctx, params }) => {
  const path = `/q/${params.secret}`;
  const form = await request.formData();
  const { snapshot } = await readCustomerQuote(ctx);
  const posted = readAnswers(
    form,
    snapshot.jobs.map((job) => job.id),
  );
  const given = {
    answers: Object.fromEntries(posted.answers.map(({ jobId, answer }) => [jobId, answer])),
    reasons: Object.fromEntries(posted.answers.flatMap(({ jobId, reason }) => (reason ? [[jobId, reason]] : []))),
    givenBy: posted.givenBy,
    keepParts: posted.keepParts,
  };
  const errors: Record<string, string> = {};
  for (const job of snapshot.jobs) if (!given.answers[job.id]) errors[job.id] = "Say yes or not now.";
  if (posted.givenBy.length < 2) errors.givenBy = "Type your full name.";
  if (!posted.mayDecide) errors.mayDecide = "Tick this, or have the owner answer.";
  if (Object.keys(errors).length > 0)
    return seeOther(
      path,
      faultCookie(path, { errors: { form: "Something is missing below. Nothing was sent yet.", ...errors }, given }),
    );
  try {
    await perform(giveApproval, ctx, { answers: posted.answers, givenBy: posted.givenBy, keepParts: posted.keepParts });
    return seeOther(path, clearFaults(path));
  } catch (error) {
    const refused = toAppError(error);
    if (refused.code === "internal") logFault(ctx.requestId, "/q/answer", error);
    return seeOther(path, faultCookie(path, { errors: { form: refused.message }, given }));
  }
});
